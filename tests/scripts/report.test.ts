import { describe, expect, it } from 'vitest';
import { countCheck, countPlaywright, countVitest, summary, table } from '@/scripts/lib/report.mjs';

type VitestNumbers = { passed?: number; failed?: number; pending?: number; todo?: number };

function vitestReport({ passed = 0, failed = 0, pending = 0, todo = 0 }: VitestNumbers, files: unknown[] = []): string {
  return JSON.stringify({
    numPassedTests: passed,
    numFailedTests: failed,
    numPendingTests: pending,
    numTodoTests: todo,
    testResults: files,
  });
}

function playwrightReport(stats: Partial<Record<'expected' | 'unexpected' | 'flaky' | 'skipped', number>>, errors: unknown[] = []): string {
  return JSON.stringify({ stats: { expected: 0, unexpected: 0, flaky: 0, skipped: 0, ...stats }, errors });
}

describe('what a Vitest report comes to', () => {
  it('is what passed and failed', () => {
    expect(countVitest(vitestReport({ passed: 7, failed: 2 }), 1)).toEqual({ passed: 7, failed: 2, remarks: [] });
  });

  it('counts a skipped and a planned test as failed, because neither guards anything', () => {
    const { passed, failed, remarks } = countVitest(vitestReport({ passed: 3, pending: 2, todo: 1 }), 0);
    expect([passed, failed]).toEqual([3, 3]);
    expect(remarks.join()).toContain('3 skipped');
  });

  it('lets tests be skipped that the person left out by name', () => {
    expect(countVitest(vitestReport({ passed: 1, pending: 40 }), 0, { skippedFail: false })).toEqual({
      passed: 1,
      failed: 0,
      remarks: [],
    });
  });

  it('counts a file that could not be loaded', () => {
    const broken = { name: 'a.test.ts', status: 'failed', assertionResults: [] };
    expect(countVitest(vitestReport({ passed: 4 }, [broken]), 1)).toMatchObject({ passed: 4, failed: 1 });
  });

  it('counts one failed when no test was found', () => {
    expect(countVitest(vitestReport({}), 0)).toMatchObject({ passed: 0, failed: 1 });
  });

  it('counts one failed when the runner ended with an error that no test shows', () => {
    expect(countVitest(vitestReport({ passed: 5 }), 1)).toMatchObject({ passed: 5, failed: 1 });
    expect(countVitest(vitestReport({ passed: 5 }), null)).toMatchObject({ passed: 5, failed: 1 });
  });

  it.each([[null], [''], ['{"numPassedTests": 12, "testRes'], ['null'], ['{}']])('counts a dead runner as one failed: %j', (text) => {
    expect(countVitest(text, 137)).toMatchObject({ passed: 0, failed: 1 });
  });
});

describe('what a Playwright report comes to', () => {
  it('is what was expected and what was not', () => {
    expect(countPlaywright(playwrightReport({ expected: 9, unexpected: 1 }), 1)).toEqual({ passed: 9, failed: 1, remarks: [] });
  });

  it('counts skipped and flaky tests as failed, each with a remark', () => {
    const { passed, failed, remarks } = countPlaywright(playwrightReport({ expected: 9, skipped: 2, flaky: 1 }), 0);
    expect([passed, failed]).toEqual([9, 3]);
    expect(remarks).toHaveLength(2);
  });

  it('counts errors outside any test', () => {
    expect(countPlaywright(playwrightReport({ expected: 1 }, [{ message: 'no config' }]), 1)).toMatchObject({ failed: 1 });
  });

  it('counts one failed when no test was found, or the runner died', () => {
    expect(countPlaywright(playwrightReport({}), 0)).toMatchObject({ passed: 0, failed: 1 });
    expect(countPlaywright(null, 1)).toMatchObject({ passed: 0, failed: 1 });
  });
});

describe('the summary', () => {
  const rows = [
    { name: 'lint', milliseconds: 1, ...countCheck(0) },
    { name: 'unit', milliseconds: 2, passed: 10, failed: 0, remarks: [] },
    { name: 'browser', milliseconds: 3, passed: 4, failed: 2, remarks: ['2 skipped'] },
  ];

  it('ends with one line that counts everything', () => {
    const { lines, failed } = summary(rows, String);
    expect(lines.at(-1)).toBe('15 passed, 2 failed');
    expect(failed).toBe(2);
  });

  it('shows the remarks with the part they are about', () => {
    expect(summary(rows, String).lines).toContain('browser: 2 skipped');
  });

  it('counts a check by its exit code, a killed one as failed', () => {
    expect(countCheck(0)).toMatchObject({ passed: 1, failed: 0 });
    expect(countCheck(2)).toMatchObject({ passed: 0, failed: 1 });
    expect(countCheck(null)).toMatchObject({ passed: 0, failed: 1 });
  });

  it('aligns its columns', () => {
    expect(table([['', 'n'], ['ab', '10']])).toEqual(['     n', 'ab  10']);
  });
});
