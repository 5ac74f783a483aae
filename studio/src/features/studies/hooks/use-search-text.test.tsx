import { act, renderHook } from '@testing-library/react';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { useSearchText } from './use-search-text.ts';

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());

function setUp() {
  const ask = vi.fn<(text: string) => void>();
  const hook = renderHook(({ asked }) => useSearchText(asked, ask), { initialProps: { asked: '' } });
  const type = (text: string) => {
    act(() => {
      hook.result.current[1](text);
    });
  };
  const wait = (ms: number) => {
    act(() => {
      vi.advanceTimersByTime(ms);
    });
  };
  return { ask, ...hook, type, wait, text: () => hook.result.current[0] };
}

test('asks once, after a pause, for what was typed last', () => {
  const { ask, type, wait, text } = setUp();
  type('v');
  wait(200);
  type('vi');
  expect(text()).toBe('vi');
  wait(200);
  expect(ask).not.toHaveBeenCalled();
  wait(50);
  expect(ask.mock.calls).toEqual([['vi']]);
});

test('what comes back from its own asking does not undo what was typed meanwhile', () => {
  const { ask, type, wait, rerender, text } = setUp();
  type('vi');
  wait(250);
  type('vicu');
  rerender({ asked: 'vi' });
  expect(text()).toBe('vicu');
  wait(250);
  expect(ask.mock.calls).toEqual([['vi'], ['vicu']]);
});

test('follows where somebody else changes the search, without asking again', () => {
  const { ask, type, wait, rerender, text } = setUp();
  type('vi');
  wait(250);
  rerender({ asked: 'vi' });
  rerender({ asked: '' });
  expect(text()).toBe('');
  wait(1000);
  expect(ask.mock.calls).toEqual([['vi']]);
});
