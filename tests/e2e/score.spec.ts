import { ScorePage } from './pages/score-page';
import { expect, test } from './pages/test';

test('dragging a tip deeper lets less water through, undo and redo bring both answers back, a reload loses neither', async ({
  page,
}) => {
  const score = new ScorePage(page);
  await score.openFresh();
  const before = await score.readDischarge();
  await score.dragTip(25);
  await expect.poll(() => score.readDischarge()).toBeLessThan(before);
  await score.waitForAnswer();
  const after = await score.readDischarge();
  const tipAfter = await score.tip.getAttribute('aria-valuenow');
  expect(Number(tipAfter)).toBeLessThan(-6);
  await score.waitUntilKept();

  await page.reload();
  await score.waitForAnswer();
  expect(await score.tip.getAttribute('aria-valuenow')).toBe(tipAfter);
  await page.getByRole('button', { name: /^Undo/ }).click();
  await expect(score.tip).toHaveAttribute('aria-valuenow', '-6');
  await expect.poll(() => score.readDischarge()).toBeGreaterThan(after);
  await page.keyboard.press('Control+Shift+z');
  await expect(score.tip).toHaveAttribute('aria-valuenow', tipAfter!);
  await score.waitUntilKept();
});

test('the tip moves by keyboard, and its number is edited in the sentence beside it', async ({ page }) => {
  const score = new ScorePage(page);
  await score.openFresh();
  await score.tip.focus();
  await page.keyboard.press('Shift+ArrowDown');
  await expect(score.tip).toHaveAttribute('aria-valuenow', '-7');
  const field = page.getByRole('textbox', { name: /^Tip of Sheet pile/ });
  await field.fill('deep');
  await field.press('Enter');
  await expect(field).toHaveValue('deep');
  await expect(page.getByText(/“deep” is not a number/)).toBeVisible();
  await field.fill('-24 ft');
  await field.press('Enter');
  await expect(score.tip).toHaveAttribute('aria-valuenow', '-7.3152');
  await score.waitForAnswer();
});

test('a level is edited and the answer follows; situations have their own answers', async ({ page }) => {
  const score = new ScorePage(page);
  await score.openFresh();
  const before = await score.readDischarge();
  const level = page.getByRole('textbox', { name: /^river in Mean water/ });
  await level.fill('1,1+2');
  await level.press('Enter');
  await expect(level).toHaveValue('3.1');
  await expect.poll(() => score.readDischarge()).toBeGreaterThan(before * 1.4);
  await page.getByText('Design flood', { exact: true }).click();
  await expect(page.getByRole('radio', { name: 'Design flood' })).toBeChecked();
  await score.waitForAnswer();
  await expect.poll(() => score.readDischarge()).toBeGreaterThan(before * 2);
});

test('two people change one section: neither loses anything without being asked', async ({
  page,
  context,
}) => {
  const mine = new ScorePage(page);
  await mine.openFresh();
  const other = new ScorePage(await context.newPage());
  // the other window is another person's browser as far as the section is concerned: it shares no local copy
  await other.page.addInitScript(() =>
    Object.defineProperty(window, 'localStorage', {
      value: { getItem: () => null, setItem: () => undefined },
    }),
  );
  await other.page.goto(page.url());
  await other.waitForAnswer();
  await other.tip.focus();
  await other.page.keyboard.press('ArrowDown');
  await other.waitUntilKept();
  await mine.tip.focus();
  await page.keyboard.press('Shift+ArrowDown');
  const panel = page.getByRole('alert', { name: 'Changed meanwhile' });
  await expect(panel).toContainText('They differ in barriers', { timeout: 20_000 });
  await expect(mine.tip).toHaveAttribute('aria-valuenow', '-7');
  await panel.getByRole('button', { name: /Keep mine/ }).click();
  await mine.waitUntilKept();
  // whoever has nothing unsaved sees the newer version by itself
  await expect(other.tip).toHaveAttribute('aria-valuenow', '-7', { timeout: 25_000 });
  await other.page.close();
});

test.describe('with the server away', () => {
  test.use({ allowedLog: [/ERR_INTERNET_DISCONNECTED|Failed to fetch/] });

  test('what is typed waits and goes out by itself', async ({ page, context }) => {
    const score = new ScorePage(page);
    await score.openFresh();
    await context.setOffline(true);
    await score.tip.focus();
    await page.keyboard.press('Shift+ArrowDown');
    await expect(score.keeping).toContainText('Not on the server yet', { timeout: 20_000 });
    await score.waitForAnswer();
    await context.setOffline(false);
    await score.waitUntilKept();
    await page.reload();
    await score.waitForAnswer();
    await expect(score.tip).toHaveAttribute('aria-valuenow', '-7');
  });
});

test('a wall drawn out of the ground shows a sentence in place of numbers', async ({ page }) => {
  const score = new ScorePage(page);
  await score.openFresh();
  await score.tip.focus();
  const field = page.getByRole('textbox', { name: /^Tip of Sheet pile/ });
  await field.fill('-14');
  await field.press('Enter');
  await expect(score.answer).toContainText('No number is shown');
  await expect(score.answer).toContainText('lies outside the ground');
  await expect(score.answer.locator('[data-part=discharge]')).toHaveCount(0);
});
