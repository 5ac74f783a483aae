import { afterEach, beforeEach, vi } from 'vitest';

/**
 * Makes an unexpected `console.error` fail the test that caused it.
 *
 * A test that expects one replaces the spy: `vi.spyOn(console, 'error').mockImplementation(() => {})` and asserts on it.
 */
let unexpected: unknown[][] = [];

beforeEach(() => {
  unexpected = [];
  vi.spyOn(console, 'error').mockImplementation((...args: unknown[]) => {
    unexpected.push(args);
  });
});

afterEach(() => {
  vi.restoreAllMocks();
  if (unexpected.length > 0) {
    const lines = unexpected.map((args) => args.map(String).join(' '));
    throw new Error(`console.error was called ${unexpected.length} time(s):\n${lines.join('\n')}`);
  }
});
