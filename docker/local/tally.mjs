import { readFileSync, rmSync } from 'node:fs';
import { say } from './progress.mjs';

const counts = { passed: 0, failed: 0, skipped: 0 };
const notes = [];

/** Counts one item or many; a note says what failed or why something was skipped. */
export function count(kind, number = 1, note) {
  counts[kind] += number;
  if (note) notes.push(`${kind}: ${note}`);
}

/** Prints what failed and what was skipped, and the closing line. Answers whether nothing failed. */
export function closeTally() {
  if (notes.length > 0) say(`\n${notes.join('\n')}`);
  say(`\n${counts.passed} passed, ${counts.failed} failed, ${counts.skipped} skipped`);
  return counts.failed === 0;
}

const testName = (file, test) => `${file.name.split('/tests/').at(-1)} > ${test.fullName}`;

function countFile(file) {
  const by = (status) => file.assertionResults.filter((test) => test.status === status);
  const failed = by('failed');
  count('passed', by('passed').length);
  for (const test of failed) count('failed', 1, testName(file, test));
  for (const test of file.assertionResults) {
    if (!['passed', 'failed'].includes(test.status)) count('skipped', 1, testName(file, test));
  }
  if (file.status === 'failed' && failed.length === 0)
    count('failed', 1, `${file.name.split('/tests/').at(-1)} did not run: ${file.message.split('\n')[0]}`);
  return failed.length > 0 || file.status === 'failed';
}

/** Counts a vitest project from its JSON report. A run that failed without a failed test counts as one failed item. */
export function countReport(project, reportFile, exitCode) {
  let report;
  try {
    report = JSON.parse(readFileSync(reportFile, 'utf8'));
  } catch {
    return count('failed', 1, `${project} tests ended with code ${exitCode} and no report`);
  }
  rmSync(reportFile);
  if (report.testResults.length === 0) return count('skipped', 1, `${project}: there are no such tests`);
  const anyFailed = report.testResults.map(countFile).some(Boolean);
  if (exitCode !== 0 && !anyFailed) count('failed', 1, `${project} tests ended with code ${exitCode} though each passed`);
}
