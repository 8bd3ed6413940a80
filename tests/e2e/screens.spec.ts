import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { STORIES } from '#seeders/demo/stories.ts';
import { expect, signIn, test, type Who, PEOPLE } from './people.ts';

/** What axe can judge of WCAG 2.2 at levels A and AA. */
const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22a', 'wcag22aa'];

const THEMES = [
  { theme: 'paper', colorScheme: 'light' },
  { theme: 'chalk', colorScheme: 'dark' },
] as const;
const SIZES = [
  { size: 'desk', viewport: { width: 1280, height: 800 } },
  { size: 'phone', viewport: { width: 390, height: 844 } },
] as const;

interface Screen {
  readonly name: string;
  readonly path: string;
  /** Opens what the address does not. */
  readonly open?: (page: Page) => Promise<void>;
  /** Stands there when the screen is complete. */
  readonly ready: (page: Page) => Promise<void>;
}

const idOf = (name: string): string => {
  const story = STORIES.find((one) => one.name === name);
  if (!story) throw new Error(`The demo has no project ${name}.`);
  return story.id;
};
const at = (project: string, place: string): string => `/projects/${idOf(project)}/${place}`;

const heading =
  (name: string) =>
  async (page: Page): Promise<void> =>
    expect(page.getByRole('heading', { name, level: 1 })).toBeVisible();
const text =
  (shown: RegExp) =>
  async (page: Page): Promise<void> =>
    expect(page.getByText(shown).first()).toBeVisible();
const button =
  (name: string) =>
  async (page: Page): Promise<void> => {
    await page.getByRole('button', { name, exact: true }).click();
    await expect(page.getByRole('dialog')).toBeVisible();
  };
const marks = async (page: Page): Promise<void> =>
  expect(page.getByRole('list', { name: 'Natural frequencies' })).toBeVisible();

const GATE: readonly Screen[] = [
  { name: 'sign-in', path: '/sign-in', ready: heading('Sign in') },
  { name: 'asking for a reset', path: '/reset-request', ready: heading('Reset your password') },
  { name: 'reset', path: '/reset#abcdef', ready: heading('Set a new password') },
];

const SCREENS: { readonly [W in Who]?: readonly Screen[] } = {
  mira: [
    { name: 'projects', path: '/projects', ready: text(/Coolant pump stand/) },
    ...['stand', 'skid', 'portal', 'import', 'blank'].map((from) => ({
      name: `new project, ${from}`,
      path: `/projects/new?from=${from}`,
      ready: heading('New project'),
    })),
    { name: 'frame', path: at('Coolant pump stand', 'frame'), ready: marks },
    {
      name: 'frame, parts and details open',
      path: at('Coolant pump stand', 'frame'),
      open: async (page) => {
        await page.getByRole('tab', { name: 'Members' }).click();
        await page.getByRole('rowheader').first().click();
      },
      ready: async (page) => expect(page.getByRole('region', { name: /^Details: / })).toBeVisible(),
    },
    ...['one', 'beside', 'sheet', 'table'].map((look) => ({
      name: `modes, ${look}`,
      path: `${at('Coolant pump stand', 'modes')}?look=${look}`,
      ready: text(/^Mode 1 of/),
    })),
    {
      name: 'release, returned',
      path: at('Coolant pump stand', 'release'),
      ready: text(/^Returned$/),
    },
    {
      name: 'release, approved',
      path: at('Press feeder stand', 'release'),
      ready: text(/^Lock record$/),
    },
    { name: 'activity', path: '/activity', ready: text(/submitted R1/) },
    { name: 'team', path: '/team', ready: text(/Viktor Amsel/) },
    { name: 'account', path: '/account', ready: heading('Account') },
    { name: 'not found', path: '/nowhere', ready: heading('No such page') },
  ],
  agnes: [
    {
      name: 'accepting',
      path: at('Exhaust fan skid', 'release'),
      open: button('Accept …'),
      ready: text(/fit to be released/),
    },
    {
      name: 'returning',
      path: at('Exhaust fan skid', 'release'),
      open: button('Return …'),
      ready: text(/What has to change/),
    },
  ],
  viktor: [
    {
      name: 'approving',
      path: at('Balancing rig portal', 'release'),
      open: button('Approve and lock …'),
      ready: text(/^Your password$/),
    },
  ],
  petra: [
    { name: 'team, administering', path: '/team', ready: text(/^Invitations$/) },
    { name: 'inviting', path: '/team', open: button('Invite somebody'), ready: text(/works once/) },
    { name: 'sent mail', path: '/team/mail', ready: heading('Sent mail') },
  ],
};

/** Goes to the screen and holds it against what holds for every screen. */
async function check(page: Page, screen: Screen): Promise<void> {
  await test.step(screen.name, async () => {
    await page.goto(screen.path);
    await screen.open?.(page);
    await screen.ready(page);
    const { violations } = await new AxeBuilder({ page }).withTags(RULES).analyze();
    const found = violations.flatMap(({ id, nodes }) =>
      nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')}: ${failureSummary}`),
    );
    expect.soft(found, `axe, ${screen.name}`).toEqual([]);
    const overflow = await page.evaluate(
      () => document.documentElement.scrollWidth - window.innerWidth,
    );
    expect.soft(overflow, `sideways scroll, ${screen.name}`).toBeLessThanOrEqual(0);
  });
}

for (const { theme, colorScheme } of THEMES) {
  for (const { size, viewport } of SIZES) {
    test(`every screen in ${theme} on a ${size}`, async ({ openContext }) => {
      const errors: string[] = [];
      const open = async (): Promise<Page> => {
        // Motion at rest: axe judges colours, which a blend under way would blur.
        const page = await openContext({ colorScheme, viewport, reducedMotion: 'reduce' });
        page.on('console', (message) => {
          if (message.type() === 'error') errors.push(`${page.url()}: ${message.text()}`);
        });
        return page;
      };
      const outside = await open();
      for (const screen of GATE) await check(outside, screen);
      for (const [who, screens] of Object.entries(SCREENS)) {
        const page = await open();
        await page.goto('/sign-in');
        await signIn(page, PEOPLE[who as Who].email);
        for (const screen of screens) await check(page, screen);
        await page.context().close();
      }
      expect(errors).toEqual([]);
    });
  }
}
