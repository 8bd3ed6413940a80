import { mkdirSync } from 'node:fs';
import { chromium, type Page } from '@playwright/test';
import { demoSignIns } from '#seeders/demo/people.ts';
import { STORIES } from '#seeders/demo/stories.ts';

/**
 * `npm run screenshots [address] [folder]`: the pictures of the README, taken from the running product with the
 * demo in it (`npm start` first).
 */
const address = process.argv[2] ?? 'http://127.0.0.1:4600';
const folder = process.argv[3] ?? 'public/screenshots';

type Role = (typeof demoSignIns)[number]['role'];

const story = (name: string): string => {
  const found = STORIES.find((one) => one.name === name);
  if (!found) throw new Error(`The demo has no project “${name}”.`);
  return `/projects/${found.id}`;
};

const PICTURES: readonly {
  readonly file: string;
  readonly role: Role;
  readonly theme: 'light' | 'dark';
  readonly path: string;
  /** On screen when the picture is ready. */
  readonly ready: (page: Page) => Promise<void>;
}[] = [
  {
    file: 'projects',
    role: 'reviewer',
    theme: 'light',
    path: '/projects',
    ready: (page) => page.getByRole('row').nth(5).waitFor(),
  },
  {
    file: 'frame',
    role: 'designer',
    theme: 'light',
    path: `${story('Coolant pump stand')}/frame`,
    ready: drawn,
  },
  {
    file: 'modes',
    role: 'designer',
    theme: 'dark',
    path: `${story('Exhaust fan skid')}/modes?mode=7`,
    ready: drawn,
  },
  {
    file: 'beside',
    role: 'reviewer',
    theme: 'light',
    path: `${story('Coolant pump stand')}/modes?look=beside&mode=3`,
    ready: drawn,
  },
  {
    file: 'release',
    role: 'lead',
    theme: 'light',
    path: `${story('Balancing rig portal')}/release`,
    ready: (page) => page.getByRole('button', { name: /Approve and lock/ }).waitFor(),
  },
];

/** The frequency line has its marks, and the view both its layers: the members and the ink over them. */
async function drawn(page: Page): Promise<void> {
  const line = page.getByRole('list', { name: 'Natural frequencies' });
  await line.locator('a, button').first().waitFor();
  await page.locator('canvas').nth(1).waitFor();
}

async function signIn(page: Page, role: Role): Promise<void> {
  const person = demoSignIns.find((one) => one.role === role);
  if (!person) throw new Error(`The demo has no ${role}.`);
  await page.goto(`${address}/sign-in`);
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password').fill(person.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { name: 'Projects' }).waitFor();
}

async function main(): Promise<void> {
  mkdirSync(folder, { recursive: true });
  const browser = await chromium.launch({
    executablePath: process.env['CHROMIUM_PATH'] ?? '/usr/bin/chromium',
    args: process.getuid?.() === 0 ? ['--no-sandbox'] : [],
  });
  try {
    for (const picture of PICTURES) {
      const page = await browser.newPage({
        viewport: { width: 1440, height: 900 },
        colorScheme: picture.theme,
      });
      await signIn(page, picture.role);
      await page.goto(address + picture.path);
      await picture.ready(page);
      await page.screenshot({ path: `${folder}/${picture.file}.png` });
      console.log(`${folder}/${picture.file}.png`);
      await page.close();
    }
  } finally {
    await browser.close();
  }
}

await main();
