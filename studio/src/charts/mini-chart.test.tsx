import { render } from '@testing-library/react';
import { expect, test } from 'vitest';
import { MiniChart } from './mini-chart.tsx';

const ticksOf = (y: number[], digits: number) => {
  const x = y.map((_, i) => i);
  const { container } = render(<MiniChart x={x} y={y} digits={digits} label="Factor over z" />);
  return [...container.querySelectorAll('g text')].map((text) => text.textContent);
};

test('a level table has two ticks that read differently, about its value', () => {
  for (const [value, digits] of [
    [1, 2],
    [0, 0],
    [-40, 1],
    [1.0001, 2],
  ] as const) {
    const [low, high] = ticksOf([value, value, value], digits).map((text) => Number(text.replace('\u2212', '-')));
    expect(low).toBeLessThan(value);
    expect(high).toBeGreaterThan(value);
  }
});

test('the ticks hold all of a table', () => {
  expect(ticksOf([-0.32, 0.09], 3)).toEqual(['\u22120.400', '0.100']);
});
