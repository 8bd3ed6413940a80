import { largeFrame } from './largeFrame.ts';
import { expect, importFrame, readFixture, solveButton, solveIt, test } from './people.ts';

test('a running solve is cancelled, and the queue goes on with the next', async ({ openAs }) => {
  const page = await openAs('mira');
  await importFrame(page, 'Rack to cancel', largeFrame('Rack to cancel'));
  await solveButton(page).click();
  await expect(page.getByRole('progressbar', { name: 'Solve, consistent mass' })).toBeVisible();
  await page.getByRole('button', { name: 'Cancel', exact: true }).click();
  await expect(page.getByText('cancelled', { exact: true })).toHaveCount(3);
  await expect(page.getByRole('progressbar')).toHaveCount(0);
  await expect(solveButton(page)).toBeEnabled();

  await importFrame(page, 'Frame after it', readFixture('machineFrame.json'));
  await solveIt(page);
});
