import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ensureChromium } from './support/chromium.js';

/**
 * `npm test`: every check in order, cheap ones first, and at the end the plain line `N passed, N failed`.
 * A step that doesn't count its tests counts as one.
 */
interface Step {
  readonly name: string;
  readonly command: readonly string[];
  /** reads the step's report; absent: its exit code is its one result */
  readonly count?: (report: string) => Count;
  readonly env?: Readonly<Record<string, string>>;
}
interface Count {
  readonly passed: number;
  readonly failed: number;
}

const reports = mkdtempSync(join(tmpdir(), 'motebook-reports-'));
const report = (name: string): string => join(reports, `${name}.json`);

const vitestCount = (file: string): Count => {
  const { numPassedTests, numFailedTests } = JSON.parse(file) as { numPassedTests: number; numFailedTests: number };
  return { passed: numPassedTests, failed: numFailedTests };
};
const playwrightCount = (file: string): Count => {
  const { stats } = JSON.parse(file) as { stats: { expected: number; unexpected: number; flaky: number } };
  return { passed: stats.expected + stats.flaky, failed: stats.unexpected };
};

const STEPS: readonly Step[] = [
  { name: 'format', command: ['prettier', '--check', '--log-level', 'warn', '.'] },
  { name: 'lint', command: ['eslint', '.', '--max-warnings', '0'] },
  { name: 'types', command: ['tsc', '-p', 'test/tsconfig.json'] },
  {
    name: 'unit',
    command: [
      'vitest',
      'run',
      '-c',
      'test/vitest.config.ts',
      '--reporter=dot',
      '--reporter=json',
      `--outputFile.json=${report('unit')}`,
    ],
    count: vitestCount,
  },
  {
    name: 'component',
    command: ['ng', 'test', '--no-watch', '--reporters=json', `--output-file=${report('component')}`],
    count: vitestCount,
  },
  { name: 'build', command: ['npm', 'run', 'build'] },
  {
    name: 'browser',
    command: ['playwright', 'test', '-c', 'e2e/playwright.config.ts', '--reporter=list,json'],
    env: { PLAYWRIGHT_JSON_OUTPUT_NAME: report('browser') },
    count: playwrightCount,
  },
];

function run(step: Step): Count {
  process.stdout.write(`\n── ${step.name}\n`);
  const [program = '', ...args] = step.command;
  const { status } = spawnSync(program === 'npm' ? 'npm' : 'npx', program === 'npm' ? args : [program, ...args], {
    stdio: 'inherit',
    env: { ...process.env, ...step.env },
  });
  const ok = status === 0;
  if (!step.count) return { passed: ok ? 1 : 0, failed: ok ? 0 : 1 };
  try {
    const counted = step.count(readFileSync(report(step.name), 'utf8'));
    // a run that fails without a failed test (a file that doesn't load, say) is one failure
    return ok || counted.failed > 0 ? counted : { ...counted, failed: 1 };
  } catch {
    return { passed: 0, failed: 1 }; // no report: it did not get as far as its tests
  }
}

ensureChromium();
const only = process.argv.slice(2);
const chosen = only.length === 0 ? STEPS : STEPS.filter(({ name }) => only.includes(name));
const results = chosen.map((step) => ({ name: step.name, ...run(step) }));
rmSync(reports, { recursive: true, force: true });

process.stdout.write('\n');
for (const { name, passed, failed } of results) {
  process.stdout.write(
    `${name.padEnd(10)} ${String(passed).padStart(5)} passed ${String(failed).padStart(5)} failed\n`,
  );
}
const sum = (key: 'passed' | 'failed'): number => results.reduce((total, result) => total + result[key], 0);
process.stdout.write(`\n${sum('passed')} passed, ${sum('failed')} failed\n`);
process.exitCode = sum('failed') === 0 ? 0 : 1;
