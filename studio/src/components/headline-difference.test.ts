import { describe, expect, it } from 'vitest';
import { differenceInWords } from './headline-difference.ts';

describe('differenceInWords', () => {
  it('says which way, without a sign', () => {
    expect(differenceInWords(57.8, 56.2, 1, 'duration')).toBe('1.6 slower');
    expect(differenceInWords(44.4, 44.9, 1, 'temperature')).toBe('0.5 cooler');
    expect(differenceInWords(12, 37, 0, 'margin')).toBe('25 closer');
  });
  it('agrees with the rounded values beside it', () => {
    // 0.96 and 1.04 both read 1.0; 1.04 and 1.06 read 1.0 and 1.1.
    expect(differenceInWords(1.04, 0.96, 1, 'amount')).toBe('same');
    expect(differenceInWords(1.06, 1.04, 1, 'amount')).toBe('0.1 more');
  });
  it('says nothing where one side is missing', () => expect(differenceInWords(null, 3, 1, 'amount')).toBeNull());
});
