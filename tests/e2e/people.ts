import { readFileSync } from 'node:fs';
import {
  expect,
  test as base,
  type BrowserContextOptions,
  type Locator,
  type Page,
} from '@playwright/test';
import { PASSWORD, PEOPLE } from '#seeders/demo/people.ts';

export { expect } from '@playwright/test';
export { PASSWORD, PEOPLE } from '#seeders/demo/people.ts';

export type Who = keyof typeof PEOPLE;
type Session = Awaited<ReturnType<ReturnType<Page['context']>['storageState']>>;

interface Fixtures {
  /** Opens a browser context of its own with nobody signed in. */
  readonly openContext: (options?: BrowserContextOptions) => Promise<Page>;
  /** Opens a browser context of its own, signed in as a person of the demo, at Projects. */
  readonly openAs: (who: Who, options?: BrowserContextOptions) => Promise<Page>;
}

/** Signed in once by form; later contexts begin with the same session. */
const sessions = new Map<Who, Session>();

/** What no screen may do, whatever happens: fail in script, or run against its own security policy. */
function watchForFailures(page: Page, failures: string[]): void {
  page.on('pageerror', (error) => failures.push(error.message));
  page.on('console', (message) => {
    if (/content security policy/i.test(message.text())) failures.push(message.text());
  });
}

export const test = base.extend<Fixtures>({
  openContext: async ({ browser }, use) => {
    const failures: string[] = [];
    const contexts: ReturnType<Page['context']>[] = [];
    await use(async (options) => {
      const context = await browser.newContext(options);
      contexts.push(context);
      context.on('page', (page) => watchForFailures(page, failures));
      return context.newPage();
    });
    for (const context of contexts) await context.close();
    expect(failures).toEqual([]);
  },
  openAs: async ({ openContext }, use) => {
    await use(async (who, options) => {
      const session = sessions.get(who);
      const page = await openContext({ ...options, ...(session ? { storageState: session } : {}) });
      await page.goto('/projects');
      if (!session) {
        await signIn(page, PEOPLE[who].email);
        sessions.set(who, await page.context().storageState());
      }
      await expect(page.getByRole('heading', { name: 'Projects', level: 1 })).toBeVisible();
      return page;
    });
  },
});

/** Fills in the form that stands there and waits until it has let the person in. */
export async function signIn(page: Page, email: string, password = PASSWORD): Promise<void> {
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('heading', { name: 'Sign in' })).toBeHidden();
}

/** Goes to one of the places of the open project. */
export async function goTo(page: Page, place: 'Frame' | 'Modes' | 'Release'): Promise<void> {
  await page
    .getByRole('navigation', { name: 'Project' })
    .getByRole('link', { name: place })
    .click();
  await expect(page).toHaveURL(new RegExp(`/${place.toLowerCase()}(\\?|$)`));
}

/** Begins a project with a frame document, and stands at its Frame. */
export async function importFrame(page: Page, name: string, document: unknown): Promise<void> {
  await page.goto('/projects/new?from=import');
  await page.getByLabel('Frame document', { exact: true }).setInputFiles({
    name: 'frame.json',
    mimeType: 'application/json',
    buffer: Buffer.from(JSON.stringify(document)),
  });
  await page.getByLabel('Project', { exact: true }).fill(name);
  await page.getByRole('button', { name: 'Begin with this frame' }).click();
  await expect(solveButton(page)).toBeVisible();
}

export const solveButton = (page: Page): Locator =>
  page.getByRole('button', { name: 'Solve', exact: true });

/** Presses Solve and waits until every method is in. */
export async function solveIt(page: Page): Promise<void> {
  await solveButton(page).click();
  await expect(page.getByRole('link', { name: 'See the modes' })).toBeVisible();
  await expect(page.getByText(/^first \d/)).toHaveCount(3);
}

export const readFixture = (name: string): unknown =>
  JSON.parse(readFileSync(new URL(`../fixtures/${name}`, import.meta.url), 'utf8'));
