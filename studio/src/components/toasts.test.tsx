import { act, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { toast, Toasts } from './toasts.tsx';

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());

const wait = (ms: number) =>
  act(() => {
    vi.advanceTimersByTime(ms);
  });

test('Toasts go by themselves, wait while they are pointed at, and stay where something failed', () => {
  render(<Toasts />);
  act(() => toast('Rosa is removed.'));
  wait(8000);
  expect(screen.queryByText('Rosa is removed.')).toBeNull();
  act(() => toast('Kept.'));
  fireEvent.pointerEnter(screen.getByText('Kept.').parentElement!);
  wait(60_000);
  expect(screen.getByText('Kept.')).toBeDefined();
  act(() => toast('Not kept: no connection.', { kind: 'stop' }));
  wait(60_000);
  expect(screen.getByText('Not kept: no connection.')).toBeDefined();
  screen.getAllByRole('button', { name: 'Dismiss' }).forEach((button) => fireEvent.click(button));
  expect(screen.getByRole('status').textContent).toBe('');
});

test('a toast’s action is taken once, and the toast goes with it', () => {
  const undo = vi.fn();
  render(<Toasts />);
  act(() => toast('Ledge deleted.', { action: { word: 'Undo', take: undo } }));
  fireEvent.click(screen.getByRole('button', { name: 'Undo' }));
  expect(undo).toHaveBeenCalledOnce();
  expect(screen.queryByText('Ledge deleted.')).toBeNull();
});
