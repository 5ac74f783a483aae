import { describe, expect, it } from 'vitest';
import { countPlaywright, countVitest } from './count-results.mjs';

const file = (status: string, ...tests: string[]) => ({
  status,
  assertionResults: tests.map((test) => ({ status: test })),
});

describe('countVitest', () => {
  it('counts each test, not each file', () => {
    const report = { testResults: [file('passed', 'passed', 'passed'), file('failed', 'passed', 'failed', 'failed')] };
    expect(countVitest(report, 1)).toEqual({ passed: 3, failed: 2 });
  });

  it('counts a file that could not be loaded as one failure', () => {
    expect(countVitest({ testResults: [file('failed'), file('passed', 'passed')] }, 1)).toEqual({
      passed: 1,
      failed: 1,
    });
  });

  it('counts a bad end without a failed test as one failure', () => {
    expect(countVitest({ testResults: [file('passed', 'passed')] }, 1)).toEqual({ passed: 1, failed: 1 });
  });

  it('counts a skipped test neither way', () => {
    expect(countVitest({ testResults: [file('passed', 'passed', 'pending')] }, 0)).toEqual({ passed: 1, failed: 0 });
  });
});

describe('countPlaywright', () => {
  const stats = { expected: 4, unexpected: 0, flaky: 0, skipped: 0 };

  it('counts expected results as passed', () => {
    expect(countPlaywright({ stats, errors: [] }, 0)).toEqual({ passed: 4, failed: 0 });
  });

  it('counts flaky and skipped tests as failed', () => {
    expect(countPlaywright({ stats: { ...stats, flaky: 1, skipped: 2 } }, 0)).toEqual({ passed: 4, failed: 3 });
  });

  it('counts an error outside the tests once', () => {
    const nothingRan = { ...stats, expected: 0 };
    expect(countPlaywright({ stats: nothingRan, errors: [{}] }, 1)).toEqual({ passed: 0, failed: 1 });
    expect(countPlaywright({ stats: nothingRan, errors: [] }, 1)).toEqual({ passed: 0, failed: 1 });
  });
});
