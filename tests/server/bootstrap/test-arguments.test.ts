import { describe, expect, it } from 'vitest';
import { countResults, needsServices } from '#server/bootstrap/test-arguments.mjs';

describe('needsServices', () => {
  it.each([
    [[], true],
    [['tests/shared'], false],
    [['tests/shared/units', './tests/architecture', '--bail=1'], false],
    [['tests/shared', 'tests/server'], true],
    [['tests/sharedness'], true],
    [['--project', 'pure'], true],
  ])('for %j is %s', (args, expected) => {
    expect(needsServices(args)).toBe(expected);
  });
});

describe('countResults', () => {
  const report = (numPassedTests: number, numFailedTests: number, testResults: unknown[] = []) =>
    JSON.stringify({ numPassedTests, numFailedTests, testResults });

  it('counts what the report says', () => {
    expect(countResults(report(12, 0), 0)).toEqual({ passed: 12, failed: 0 });
    expect(countResults(report(12, 3), 1)).toEqual({ passed: 12, failed: 3 });
  });

  it('counts a file that could not be loaded as one that failed', () => {
    const unloadable = { status: 'failed', assertionResults: [] };
    expect(countResults(report(12, 0, [unloadable]), 1)).toEqual({ passed: 12, failed: 1 });
  });

  it('takes no tests, no report and a bad end without a reason for failures', () => {
    expect(countResults(report(0, 0), 0)).toEqual({ passed: 0, failed: 1 });
    expect(countResults(undefined, null)).toEqual({ passed: 0, failed: 1 });
    expect(countResults(report(12, 0), 1)).toEqual({ passed: 12, failed: 1 });
  });
});
