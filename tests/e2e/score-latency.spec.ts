import { ScorePage } from './pages/score-page';
import { expect, test } from './pages/test';

/** A page that took this long would be broken, not slow: the figure itself is printed, not asserted. */
const broken = 1000;

// recording a trace takes pictures of the page between edits, which is work the page does not do for a person
test.use({ trace: 'off' });

test('100 edits: time from the key to the drawn answer', async ({ page }) => {
  test.setTimeout(180_000);
  const score = new ScorePage(page);
  await score.openFresh();
  await score.tip.focus();
  const times: number[] = [];
  for (let i = 0; i < 100; i++) {
    const key = i % 20 < 10 ? 'ArrowDown' : 'ArrowUp';
    times.push(
      await page.evaluate(async (name) => {
        const answers = (): number => performance.getEntriesByName('underfall:live-answer').length;
        const target = document.activeElement!;
        const count = answers();
        const began = performance.now();
        target.dispatchEvent(new KeyboardEvent('keydown', { key: name, bubbles: true, cancelable: true }));
        while (answers() === count) await new Promise((resolve) => setTimeout(resolve, 0));
        // the picture with the new fields is drawn in the effect that follows the answer, within a frame
        await new Promise((resolve) => requestAnimationFrame(() => setTimeout(resolve, 0)));
        return performance.now() - began;
      }, key),
    );
    await page.waitForTimeout(350); // lets the full solve at rest end, as it does between a person's edits
  }
  times.sort((a, b) => a - b);
  console.log(
    `edit to drawn answer, ms: p50 ${times[49]!.toFixed(0)}, p95 ${times[94]!.toFixed(0)}, max ${times[99]!.toFixed(0)}`,
  );
  expect(times[94]).toBeLessThan(broken);
});
