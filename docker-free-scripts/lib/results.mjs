/** Counting what the test runners report, and printing failures readably. */
import { existsSync, readFileSync } from 'node:fs';

export class Tally {
  passed = 0;
  failed = 0;
  skipped = 0;
  failures = [];

  pass(count = 1) {
    this.passed += count;
  }

  fail(name, detail = '') {
    this.failed += 1;
    this.failures.push({ name, detail });
  }

  /** The one plain line that ends a test run. */
  line() {
    return `${this.passed} passed, ${this.failed} failed${this.skipped > 0 ? `, ${this.skipped} skipped` : ''}`;
  }
}

function read(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null;
}

/** Vitest's JSON report: each test counts, and so does a file that could not be loaded. */
export function addVitest(tally, file, name, exitCode) {
  const report = read(file);
  if (!report) return tally.fail(name, 'The runner wrote no report.');
  for (const suite of report.testResults) {
    const tests = suite.assertionResults;
    for (const test of tests) {
      if (test.status === 'passed') tally.pass();
      else if (test.status === 'failed') tally.fail(`${name}: ${test.fullName}`, test.failureMessages.join('\n'));
      else tally.skipped += 1;
    }
    if (suite.status === 'failed' && !tests.some((test) => test.status === 'failed'))
      tally.fail(`${name}: ${suite.name}`, suite.message);
  }
  if (exitCode !== 0 && tally.failed === 0) tally.fail(name, `The runner ended with ${exitCode}.`);
}

function* playwrightSpecs(suites, path = []) {
  for (const suite of suites ?? []) {
    const here = [...path, suite.title];
    for (const spec of suite.specs ?? []) yield { spec, title: [...here, spec.title].filter(Boolean).join(' › ') };
    yield* playwrightSpecs(suite.suites, here);
  }
}

/** Playwright's JSON report: a spec counts once for each project it ran in. */
export function addPlaywright(tally, file, name, exitCode) {
  const report = read(file);
  if (!report) return tally.fail(name, 'The runner wrote no report.');
  for (const { spec, title } of playwrightSpecs(report.suites)) {
    for (const test of spec.tests) {
      const errors = test.results.flatMap((result) => result.errors.map((error) => error.message));
      if (test.status === 'skipped') tally.skipped += 1;
      else if (test.status === 'expected') tally.pass();
      else tally.fail(`${name}: ${title} (${test.projectName}, ${test.status})`, errors.join('\n'));
    }
  }
  for (const error of report.errors ?? []) tally.fail(name, error.message);
  if (exitCode !== 0 && tally.failed === 0) tally.fail(name, `The runner ended with ${exitCode}.`);
}
