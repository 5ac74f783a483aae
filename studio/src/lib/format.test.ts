import { describe, expect, it } from 'vitest';
import { formatClock, formatHoursAndMinutes, formatNumber, formatQuantity, formatSoc } from './format.ts';

describe('formatNumber', () => {
  it('writes a real minus sign', () => expect(formatNumber(-4.25, 2)).toBe('\u22124.25'));
  it('gives no sign to what rounds to nought', () => expect(formatNumber(-0.04, 1)).toBe('0.0'));
  it('does not group thousands', () => expect(formatNumber(12345.6, 0)).toBe('12346'));
});

describe('formatQuantity', () => {
  it('keeps the decimals of the trade', () => {
    expect(formatQuantity('cellV', 4.15)).toBe('4.150');
    expect(formatQuantity('packV', 399.4)).toBe('399');
    expect(formatQuantity('ledgerKwh', 90.2441)).toBe('90.24');
  });
  it('says "not reached" for null', () => expect(formatQuantity('min', null)).toBe('not reached'));
});

describe('times', () => {
  it('formatHoursAndMinutes', () => {
    expect(formatHoursAndMinutes(439.2)).toBe('7 h 19 min');
    expect(formatHoursAndMinutes(59.6)).toBe('1 h 0 min');
    expect(formatHoursAndMinutes(52)).toBe('52 min');
    expect(formatHoursAndMinutes(null)).toBe('not reached');
  });
  it('formatClock goes round midnight', () => {
    expect(formatClock(450)).toBe('07:30');
    expect(formatClock(1470)).toBe('00:30');
  });
});

it('formatSoc writes a share as percent', () => expect(formatSoc(0.593)).toBe('59'));
