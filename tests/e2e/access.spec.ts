import type { Page } from '@playwright/test';
import { STORIES } from '#seeders/demo/stories.ts';
import { expect, goTo, PEOPLE, signIn, test } from './people.ts';

const NEW_PASSWORD = 'nine geese over the weir';

/** Follows the link of the newest mail to an address, as its reader would. */
async function linkMailedTo(
  administrator: Page,
  address: string,
  subject: RegExp,
): Promise<string> {
  const link = administrator
    .getByRole('article')
    .filter({
      has: administrator.getByRole('heading', { name: subject }),
      hasText: `to ${address}`,
    })
    .first()
    .getByRole('link');
  // Mail goes by a queue: the administrator looks again until it is there.
  await expect(async () => {
    await administrator.goto('/team/mail');
    await expect(link).toBeVisible({ timeout: 2_000 });
  }).toPass();
  return (await link.getAttribute('href')) ?? '';
}

const story = (sharedWithGuest: boolean) => {
  const found = STORIES.find(({ sharedWith }) => sharedWith.includes('noor') === sharedWithGuest);
  if (!found) throw new Error('The demo has no such project.');
  return found;
};

test('a guest sees what is shared, to read; everything else is not there', async ({ openAs }) => {
  const page = await openAs('noor');
  for (const { name, sharedWith } of STORIES) {
    await expect(page.getByRole('link', { name, exact: true })).toHaveCount(
      sharedWith.includes('noor') ? 1 : 0,
    );
  }
  await expect(page.getByRole('link', { name: 'New project' })).toHaveCount(0);
  await page.getByRole('link', { name: story(true).name, exact: true }).click();
  await expect(page.getByRole('img', { name: /members/ })).toBeVisible();
  await expect(page.getByRole('button', { name: 'Solve', exact: true })).toHaveCount(0);
  await expect(page.getByRole('button', { name: 'Add member' })).toHaveCount(0);
  await page.getByRole('tab', { name: 'Members' }).click();
  await page.getByRole('rowheader').first().click();
  const panel = page.getByRole('region', { name: /^Details: / });
  await expect(panel.getByLabel('Section')).toBeDisabled();
  await expect(panel.getByRole('button', { name: 'Remove' })).toHaveCount(0);
  await goTo(page, 'Release');
  await expect(page.getByRole('button', { name: 'Submit for review' })).toHaveCount(0);

  for (const id of [story(false).id, '00000000-0000-4000-8000-000000000000']) {
    await page.goto(`/projects/${id}`);
    await expect(page.getByRole('main').getByRole('alert')).toContainText(/not shared with you/);
  }
  await page.goto('/nowhere');
  await expect(page.getByRole('heading', { name: 'No such page' })).toBeVisible();
});

test('by invitation one joins; a reset by mail ends every session', async ({
  openAs,
  openContext,
}) => {
  const address = 'ines@ellerby.example';
  const administrator = await openAs('petra');
  await administrator.getByRole('navigation', { name: 'Team' }).getByText('Team').click();
  await administrator.getByRole('button', { name: 'Invite somebody' }).click();
  const dialog = administrator.getByRole('dialog');
  await dialog.getByLabel('E-mail').fill(address);
  await dialog.getByLabel('Role').selectOption('designer');
  await dialog.getByRole('button', { name: 'Send the invitation' }).click();
  await expect(administrator.getByText(`Invitation sent to ${address}`).first()).toBeVisible();

  const invitation = await linkMailedTo(administrator, address, /^Invitation to/);
  const invited = await openContext();
  await invited.goto(invitation);
  await invited.getByLabel('Your name').fill('Ines Corvo');
  await invited.getByLabel('Password').fill('short');
  await invited.getByRole('button', { name: /^Join/ }).click();
  await expect(invited.getByLabel('Password')).toHaveAttribute('aria-invalid', 'true');
  await invited.getByLabel('Password').fill('seven crows on a gantry');
  await invited.getByRole('button', { name: /^Join/ }).click();
  await expect(
    invited
      .getByText('No project is shared with you yet')
      .or(invited.getByText('Begin with a frame')),
  ).toBeVisible();

  // The link works once.
  const again = await openContext();
  await again.goto(invitation);
  await expect(again.getByRole('alert')).toBeVisible();

  await again.goto('/sign-in');
  await again.getByRole('link', { name: 'I have forgotten my password' }).click();
  await again.getByLabel('E-mail').fill(address);
  await again.getByRole('button', { name: 'Send the link' }).click();
  await expect(again.getByRole('status').filter({ hasText: 'Sent' })).toBeVisible();
  const reset = await linkMailedTo(administrator, address, /^A new password/);
  await again.goto(reset);
  await again.getByLabel('New password').fill(NEW_PASSWORD);
  await again.getByRole('button', { name: 'Set the password' }).click();
  await again.getByRole('link', { name: 'Sign in' }).click();
  await signIn(again, address, NEW_PASSWORD);
  await expect(again.getByRole('heading', { name: 'Projects', level: 1 })).toBeVisible();

  await invited.reload();
  await expect(invited.getByRole('heading', { name: 'Sign in' })).toBeVisible();
});

test('signing out everywhere ends the session of another browser', async ({ openContext }) => {
  const [here, there] = [await openContext(), await openContext()];
  for (const page of [here, there]) {
    await page.goto('/account');
    await signIn(page, PEOPLE.tomas.email);
    await expect(page.getByRole('heading', { name: 'Account' })).toBeVisible();
  }
  await here.getByRole('button', { name: 'Sign out everywhere' }).click();
  await here.getByRole('dialog').getByRole('button', { name: 'Sign out everywhere' }).click();
  await expect(here.getByRole('heading', { name: 'Sign in' })).toBeVisible();
  await there.getByRole('link', { name: 'Activity' }).click();
  await expect(there.getByRole('heading', { name: 'Sign in' })).toBeVisible();
});
