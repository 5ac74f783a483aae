import { quantities, type Quantity } from '@voltiplano/engine';
import { expect, it } from 'vitest';
import { quantityParts, rangeInWords } from './quantity-table.ts';

it('quantityParts loses no quantity', () => {
  const rows = quantityParts(quantities).flatMap((part) => part.rows);
  expect(rows).toHaveLength(Object.keys(quantities).length);
});

it('rangeInWords says what is refused at its least value', () => {
  const quantity: Quantity = { label: '', unit: '', min: 0, max: 5, what: '', above: true, integer: true };
  expect(rangeInWords(quantity)).toBe('above 0 to 5, whole');
  expect(rangeInWords({ ...quantity, min: -40, above: undefined, integer: undefined })).toBe('\u221240 to 5');
});
