import { expect, importFrame, readFixture, solveIt, test } from './people.ts';

test('frequencies follow a frame while it is being changed', async ({ openAs }) => {
  const page = await openAs('mira');
  const line = page.getByRole('region', { name: 'Frequency line' });
  const preview = line.getByRole('status');

  await test.step('a frame that nobody has solved yet has a preview', async () => {
    await importFrame(page, 'Previewed stand', readFixture('machineFrame.json'));
    // The machine frame of the check values, computed independently: 47.2 and 54.2 Hz.
    await expect(preview).toHaveText(/natural frequencies 47\.2 Hz, 54\.2 Hz/);
    await expect(line).toContainText('preview, not stored');
  });

  await test.step('the stored result takes its place', async () => {
    await solveIt(page);
    await expect(line).not.toContainText('preview');
    await expect(line.getByRole('link', { name: /^Mode 1, 47\.21 Hz/ })).toBeVisible();
  });

  await test.step('an edit moves the marks, and undo brings the stored ones back', async () => {
    await page.getByRole('tab', { name: 'Masses' }).click();
    const mass = page.getByRole('row', { name: /Motor/ }).getByRole('textbox').last();
    await mass.fill('60');
    await mass.press('Enter');
    await expect(line).toContainText('preview, not stored');
    await expect(preview).not.toHaveText(/natural frequencies 47\.2 Hz/);
    await page.getByRole('button', { name: 'Undo' }).click();
    await expect(line).not.toContainText('preview');
    await expect(line.getByRole('link', { name: /^Mode 1, 47\.21 Hz/ })).toBeVisible();
  });
});
