import { largeFrame } from './largeFrame.ts';
import { expect, importFrame, solveButton, test } from './people.ts';
import { killProduct, startProduct, stopProduct } from './product.ts';

const INTERRUPTIONS: readonly { how: string; end: () => void | Promise<void> }[] = [
  { how: 'restarted', end: stopProduct },
  { how: 'killed', end: killProduct },
];

for (const { how, end } of INTERRUPTIONS) {
  test(`a solve ends once although the server is ${how} in the middle of it`, async ({
    openAs,
  }) => {
    const page = await openAs('mira');
    await importFrame(page, `Rack, server ${how}`, largeFrame(`Rack, server ${how}`));
    await solveButton(page).click();
    await expect(page.getByRole('progressbar', { name: 'Solve, consistent mass' })).toHaveAttribute(
      'aria-valuenow',
      /^[1-9]/,
    );
    await end();
    await startProduct();

    // The page is never reloaded: it has to find the server again by itself.
    await expect(page.getByText(/^first \d/)).toHaveCount(3, { timeout: 90_000 });
    await expect(page.getByRole('progressbar')).toHaveCount(0);
    await page.getByRole('link', { name: 'See the modes' }).click();
    await expect(page.getByRole('region', { name: 'Mode 1' })).toBeVisible();
    await page.getByRole('link', { name: 'Activity' }).click();
    await page
      .getByRole('combobox', { name: 'Project' })
      .selectOption({ label: `Rack, server ${how}` });
    await expect(page.getByText('asked for a solve: consistent, lumped, mesh-free')).toHaveCount(1);
  });
}
