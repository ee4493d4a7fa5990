import { expectNoAxeFindings, expectNoSidewaysScroll } from './pages/looks';
import { ScorePage } from './pages/score-page';
import { expect, test } from './pages/test';

test('the table: a path pasted from a spreadsheet is one undoable step; all of it passes the accessibility check', async ({
  page,
}) => {
  const score = new ScorePage(page);
  await score.openFresh();
  await page.getByText('Table', { exact: true }).click();
  const walls = page.getByRole('region', { name: 'Walls' }).first();
  await walls.locator('summary').first().click();
  const tip = page.getByRole('textbox', { name: /Path of Sheet pile, point 2, elevation/ });
  await expect(tip).toHaveValue('-6');
  await page.getByRole('textbox', { name: /Path of Sheet pile, point 2, chainage/ }).evaluate((element) => {
    const clipboardData = new DataTransfer();
    clipboardData.setData('text', '0\t-5,5\n0\t-7,25');
    element.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }));
  });
  await expect(tip).toHaveValue('-5.5');
  await expect(page.getByRole('textbox', { name: /Path of Sheet pile, point 3, elevation/ })).toHaveValue(
    '-7.25',
  );
  await expectNoAxeFindings(page);
  await page.getByRole('button', { name: /^Undo/ }).click();
  await expect(tip).toHaveValue('-6');
  await page.setViewportSize({ width: 390, height: 844 });
  await expectNoSidewaysScroll(page);
});
