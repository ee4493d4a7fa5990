// Reads a vitest or Playwright JSON report and prints "PASSED FAILED". A run that ended badly without naming a failed test
// (a file that did not load, no report at all) counts as one failure, so that nothing passes by not running.
import { readFileSync } from 'node:fs';

const [file, status] = process.argv.slice(2);
let passed = 0;
let failed = 0;
try {
  const report = JSON.parse(readFileSync(file, 'utf8'));
  if ('numPassedTests' in report) {
    passed = report.numPassedTests;
    failed = report.numFailedTests;
  } else {
    passed = report.stats.expected + report.stats.flaky;
    failed = report.stats.unexpected;
  }
} catch {
  failed = 0;
}
if (failed === 0 && (status !== '0' || passed === 0)) failed = 1;
console.log(`${passed} ${failed}`);
