import type { Page } from '@playwright/test';
import { aStand } from '#tests/builders/aFrame.ts';
import { expect, importFrame, test } from './people.ts';

test('a broken document is refused with every place, and nothing is made', async ({ openAs }) => {
  const page = await openAs('mira');
  const stand = aStand();
  const broken = {
    ...stand,
    materials: stand.materials.map((material) => ({ ...material, nu: 0.7 })),
    members: stand.members.map((member, i) =>
      i === 2 ? { ...member, end: 'nowhere', paint: 'red' } : member,
    ),
    masses: stand.masses.map((mass) => ({ ...mass, mass: -4 })),
  };
  await page.goto('/projects/new?from=import');
  const choose = (text: string) =>
    page.getByLabel('Frame document', { exact: true }).setInputFiles({
      name: 'broken stand.json',
      mimeType: 'application/json',
      buffer: Buffer.from(text),
    });

  await choose(JSON.stringify(stand).slice(0, 200));
  await expect(page.getByRole('alert')).toContainText('no JSON');

  await choose(JSON.stringify(broken));
  const alert = page.getByRole('alert');
  await expect(alert).toContainText('broken stand.json');
  for (const path of ['materials.0.nu', 'members.2.paint', 'masses.0.mass']) {
    await expect(alert.getByText(path, { exact: true })).toBeVisible();
  }
  await expect(page.getByRole('button', { name: 'Begin with this frame' })).toBeHidden();

  await page.goto('/projects');
  await page.getByRole('searchbox').fill(stand.name);
  await expect(page.getByText('Nothing found for')).toBeVisible();

  // Mended, the same file is taken.
  await page.goto('/projects/new?from=import');
  await choose(JSON.stringify(stand));
  await expect(page.getByRole('status').filter({ hasText: '11 nodes, 12 members' })).toBeVisible();
});

test('two windows change one draft: the second is told what the first did, and chooses', async ({
  openAs,
}) => {
  const first = await openAs('mira');
  await importFrame(first, 'Drawn twice', aStand());
  const second = await openAs('mira');
  await second.goto(first.url());
  await expect(second.getByText('saved', { exact: true })).toBeVisible();

  const changeMass = async (page: Page, kilograms: string) => {
    await page.getByRole('tab', { name: 'Masses' }).click();
    await page.getByRole('rowheader', { name: 'motor' }).click();
    const panel = page.getByRole('region', { name: /^Details: / });
    const mass = panel.getByLabel('Mass', { exact: true });
    await mass.fill(kilograms);
    await mass.press('Enter');
    return mass;
  };
  const dialog = second.getByRole('dialog', { name: 'The draft was changed by somebody else' });
  const saved = (page: Page) => expect(page.getByText('saved', { exact: true })).toBeVisible();

  // Somebody has worked in the second window already; then it loses its connection while the first goes on.
  await changeMass(second, '121 kg');
  await saved(second);
  await expect(first.getByRole('tab', { name: 'Masses' })).toBeVisible();
  await second.context().setOffline(true);
  await changeMass(first, '130 kg');
  await saved(first);
  const mass = await changeMass(second, '145 kg');
  await expect(second.getByText('not saved: no connection')).toBeVisible();
  await second.context().setOffline(false);
  await expect(dialog).toContainText('Mira Castellan');
  await expect(dialog).toContainText('Mass motor changed (mass)');
  await dialog.getByRole('button', { name: 'Take theirs' }).click();
  await expect(dialog).toBeHidden();
  await expect(mass).toHaveValue(/^130/);
  await saved(second);

  // The other choice: one's own becomes the newest version, and the other window follows.
  await second.context().setOffline(true);
  const firstMass = await changeMass(first, '150 kg');
  await saved(first);
  await changeMass(second, '155 kg');
  await expect(second.getByText('not saved: no connection')).toBeVisible();
  await second.context().setOffline(false);
  await dialog.getByRole('button', { name: 'Keep mine as the newest version' }).click();
  await expect(dialog).toBeHidden();
  await saved(second);
  await expect(firstMass).toHaveValue(/^155/);
});
