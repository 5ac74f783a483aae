import { describe, expect, it } from 'vitest';
import { placeNote } from './notes.ts';

const area = { left: 0, right: 400, top: 0, bottom: 100 };
const note = { dx: 20, dy: -16, text: 'hottest core 44.4 °C' };

describe('placeNote', () => {
  it('stands to the right and above', () => {
    expect(placeNote([100, 50], note, area)).toEqual({ elbowX: 120, elbowY: 34, toLeft: false });
  });
  it('turns to the left at the right end', () => expect(placeNote([390, 50], note, area)!.toLeft).toBe(true));
  it('turns down at the top', () => expect(placeNote([100, 12], note, area)!.elbowY).toBe(28));
  it('is left out where a zoom leaves its point outside', () => expect(placeNote([410, 50], note, area)).toBeNull());
  it('keeps clear of words that already stand there', () => {
    const bound = { left: 110, right: 400, top: 25, bottom: 40 };
    expect(placeNote([100, 50], note, area, [bound])).toEqual({ elbowX: 120, elbowY: 66, toLeft: false });
  });
  it('is left out where neither side has room', () => {
    expect(placeNote([50, 50], note, { ...area, right: 100 })).toBeNull();
  });
});
