import type { Quantity } from '@voltiplano/engine';

type QuantityRow = { path: string; quantity: Quantity };

/** Groups quantities by the part of the study that they belong to, in the order given. */
export function quantityParts(all: Record<string, Quantity>): { part: string; rows: QuantityRow[] }[] {
  const parts = new Map<string, QuantityRow[]>();
  for (const [path, quantity] of Object.entries(all)) {
    const part = path.split('.')[0]!;
    parts.set(part, [...(parts.get(part) ?? []), { path, quantity }]);
  }
  return [...parts].map(([part, rows]) => ({ part, rows }));
}

const plain = (value: number) => String(value).replace('-', '\u2212');

/** "0 to 5000", "above 0 to 5000", whole numbers said so. */
export function rangeInWords({ min, max, above, integer }: Quantity): string {
  return `${above ? 'above ' : ''}${plain(min)} to ${plain(max)}${integer ? ', whole' : ''}`;
}

export function usualInWords({ usual }: Quantity): string {
  return usual ? `${plain(usual[0])} to ${plain(usual[1])}` : '';
}
