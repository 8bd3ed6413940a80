import type { Locator, Page } from '@playwright/test';
import { aStand } from '#tests/builders/aFrame.ts';
import { expect, importFrame, PASSWORD, PEOPLE, test } from './people.ts';

/** More presses of Tab than any screen has things to stop at. */
const MOST_STOPS = 150;

/** Presses Tab until the focus stands there; a thing that Tab never reaches fails. */
async function tabTo(page: Page, target: Locator): Promise<void> {
  await expect(target).toBeVisible();
  for (let stop = 0; stop < MOST_STOPS; stop += 1) {
    if (await target.evaluate((element) => element === document.activeElement)) return;
    await page.keyboard.press('Tab');
  }
  throw new Error(`Tab does not reach ${target.toString()}`);
}

async function press(page: Page, target: Locator, key = 'Enter'): Promise<void> {
  await tabTo(page, target);
  await page.keyboard.press(key);
}

test('signs in, opens a project, solves and walks its modes by keyboard alone', async ({
  openAs,
  openContext,
}) => {
  const project = 'Stand by keyboard';
  await importFrame(await openAs('mira'), project, aStand());

  const page = await openContext();
  await page.goto('/');
  await tabTo(page, page.getByLabel('E-mail'));
  await page.keyboard.type(PEOPLE.mira.email);
  await page.keyboard.press('Tab');
  await page.keyboard.type(PASSWORD);
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { name: 'Projects', level: 1 })).toBeFocused();

  await press(page, page.getByRole('link', { name: project, exact: true }));
  await press(page, page.getByRole('button', { name: 'Solve', exact: true }));
  await expect(page.getByText(/^first \d/)).toHaveCount(2);
  await press(page, page.getByRole('link', { name: 'See the modes' }));
  await expect(page.getByText(/^Mode 1 of/)).toBeVisible();
  await press(page, page.getByRole('button', { name: 'Next mode' }));
  await expect(page.getByText(/^Mode 2 of/)).toBeVisible();
  await page.keyboard.press('Enter');
  await expect(page.getByText(/^Mode 3 of/)).toBeVisible();
  await page.keyboard.press('Shift+Tab');
  await page.keyboard.press('Enter');
  await expect(page.getByText(/^Mode 2 of/)).toBeVisible();
  const line = page.getByRole('region', { name: 'Frequency line' });
  await press(page, line.getByRole('link', { name: /^Mode 1, / }));
  await expect(page.getByText(/^Mode 1 of/)).toBeVisible();
});
