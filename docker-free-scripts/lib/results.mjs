/** Counting what the test runners report, and printing failures readably. */
import { existsSync, readFileSync } from 'node:fs';
import { stripVTControlCharacters } from 'node:util';

const DETAIL_SHOWN = 4_000;

export class Tally {
  passed = 0;
  failed = 0;
  skipped = 0;
  failures = [];

  pass() {
    this.passed += 1;
  }

  fail(name, detail = '') {
    this.failed += 1;
    this.failures.push({ name, detail: stripVTControlCharacters(detail).trim() });
  }

  /** The failures for a person: the end of a long message says more than its beginning only for logs, so keep both. */
  story() {
    const shorten = (text) =>
      text.length <= DETAIL_SHOWN
        ? text
        : `${text.slice(0, DETAIL_SHOWN / 2)}\n  […]\n${text.slice(-DETAIL_SHOWN / 2)}`;
    return this.failures.map(({ name, detail }) => `\nFAILED ${name}\n${shorten(detail)}`).join('\n');
  }

  /** The one plain line that ends a test run. */
  line() {
    return `${this.passed} passed, ${this.failed} failed`;
  }
}

function read(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null;
}

/** Counts one runner's report; a runner that ended badly is a failure even where no test of it was. */
function count(tally, runner, { file, code, output }, add) {
  const before = tally.failed;
  const report = read(file);
  if (report) add(report);
  if (tally.failed > before || (report && code === 0)) return;
  tally.fail(
    runner,
    `${report ? `The runner ended with ${code}.` : 'The runner wrote no report.'}\n${output}`,
  );
}

/** Vitest's JSON report: each test counts, and so does a file that could not be loaded. */
export function addVitest(tally, runner, run) {
  count(tally, runner, run, (report) => {
    for (const file of report.testResults) {
      const tests = file.assertionResults;
      for (const test of tests) {
        if (test.status === 'passed') tally.pass();
        else if (test.status === 'failed')
          tally.fail(`${runner}: ${file.name} › ${test.fullName}`, test.failureMessages.join('\n'));
        else tally.skipped += 1;
      }
      if (file.status === 'failed' && !tests.some((test) => test.status === 'failed'))
        tally.fail(`${runner}: ${file.name}`, file.message);
    }
  });
}

function* specsOf(suites, path = []) {
  for (const suite of suites ?? []) {
    const here = [...path, suite.title];
    for (const spec of suite.specs ?? [])
      yield { spec, title: [...here, spec.title].filter(Boolean).join(' › ') };
    yield* specsOf(suite.suites, here);
  }
}

/** Playwright's JSON report: a spec counts once for each project it ran in; one that passed at the second try failed. */
export function addPlaywright(tally, runner, run) {
  count(tally, runner, run, (report) => {
    for (const { spec, title } of specsOf(report.suites)) {
      for (const test of spec.tests) {
        const errors = test.results.flatMap(({ errors, attachments = [] }) => [
          ...errors.map((error) => error.message),
          ...attachments.filter(({ path }) => path).map(({ name, path }) => `${name}: ${path}`),
        ]);
        if (test.status === 'expected') tally.pass();
        else if (test.status === 'skipped') tally.skipped += 1;
        else tally.fail(`${runner}: ${title} (${test.projectName}, ${test.status})`, errors.join('\n'));
      }
    }
    for (const error of report.errors ?? []) tally.fail(runner, error.message);
  });
}
