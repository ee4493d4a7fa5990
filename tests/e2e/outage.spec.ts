import { execFileSync } from 'node:child_process';
import { ScorePage } from './pages/score-page';
import { expect, test } from './pages/test';

const cluster = process.env.UNDERFALL_TEST_CLUSTER ?? '';
const port = process.env.UNDERFALL_TEST_PG_PORT ?? '';

test.use({ allowedLog: [/status of 50[03]/] });

test('the database is stopped while somebody works: nothing is lost, and all of it is kept once it is back', async ({
  page,
}) => {
  test.skip(cluster === '', 'needs the cluster that scripts/test.sh starts and may stop');
  test.setTimeout(120_000);
  const score = new ScorePage(page);
  await score.openFresh();
  execFileSync('bash', ['scripts/pg.sh', 'stop', cluster]);
  try {
    await score.tip.focus();
    await page.keyboard.press('Shift+ArrowDown');
    await expect(score.keeping).toContainText('Not on the server yet: The database cannot be reached', {
      timeout: 30_000,
    });
    await score.waitForAnswer();
  } finally {
    execFileSync('bash', ['scripts/pg.sh', 'start', cluster, port, 'fast']);
  }
  await expect(score.keeping).toContainText('All changes kept', { timeout: 60_000 });
  await page.reload();
  await score.waitForAnswer();
  await expect(score.tip).toHaveAttribute('aria-valuenow', '-7');
});
