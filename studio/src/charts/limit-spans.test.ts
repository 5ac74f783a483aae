import { limitSide, type LimitCode } from '@voltiplano/engine';
import { describe, expect, it } from 'vitest';
import { limitSpans, minutesPerSide, placedSpans } from './limit-spans.ts';

const limit: LimitCode[] = ['pack-current', 'pack-current', 'hot', 'hot', 'taper', 'taper'];
const min = [0, 10, 10, 10.01, 10.01, 30];

describe('limitSpans', () => {
  it('gathers rows under one limit', () => {
    expect(limitSpans(limit)).toEqual([
      { code: 'pack-current', fromRow: 0, toRow: 1 },
      { code: 'hot', fromRow: 2, toRow: 3 },
      { code: 'taper', fromRow: 4, toRow: 5 },
    ]);
  });
  it('of nothing is nothing', () => expect(limitSpans([])).toEqual([]));
});

describe('placedSpans', () => {
  it('meets without gaps and covers the axis', () => {
    const placed = placedSpans(limitSpans(limit), min, 0);
    expect(placed.map((span) => [span.from, span.to])).toEqual([
      [0, 10],
      [10, 10.01],
      [10.01, 30],
    ]);
  });
  it('lets a splinter pass into the span before it', () => {
    expect(placedSpans(limitSpans(limit), min, 0.1).map((span) => [span.code, span.to])).toEqual([
      ['pack-current', 10.01],
      ['taper', 30],
    ]);
  });
});

it('minutesPerSide adds up to the whole', () => {
  const minutes = Object.fromEntries(Object.keys(limitSide).map((code) => [code, 1])) as Record<LimitCode, number>;
  expect(minutesPerSide(minutes, limitSide)).toEqual({ station: 4, vehicle: 3, cell: 4 });
});
