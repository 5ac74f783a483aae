import { chargeQuantities } from './charge-quantities.ts';
import { driveQuantities } from './drive-quantities.ts';
import { packQuantities } from './pack-quantities.ts';
import type { Quantity } from './quantity.ts';
import { thermalQuantities } from './thermal-quantities.ts';

/**
 * Every numeric input of a study by its path, `[]` standing for any row.
 * One table feeds the schema's ranges, the JSON Schema's descriptions, and the help beside each input.
 */
export const quantities = {
  ...packQuantities,
  ...thermalQuantities,
  ...chargeQuantities,
  ...driveQuantities,
} as const satisfies Record<string, Quantity>;

export type QuantityPath = keyof typeof quantities;
