import type { EnergyLedger } from '@voltiplano/engine';
import { describe, expect, it } from 'vitest';
import { ledgerFoot, ledgerSteps } from './ledger-steps.ts';

const ledger: EnergyLedger = {
  gridKwh: 20,
  rectifierLossKwh: 1,
  stationKwh: 19,
  inletKwh: 0.1,
  boostLossKwh: 0,
  auxiliariesKwh: 0.4,
  busbarKwh: 0.2,
  ohmicKwh: 0.6,
  polarisationKwh: 0.4,
  reversibleKwh: -0.1,
  storedKwh: 17.4,
  rcPairsKwh: 0,
  remainderKwh: 0,
};

describe('ledgerSteps', () => {
  it('goes down from the grid to what is stored, without a gap', () => {
    const steps = ledgerSteps(ledger);
    steps.slice(1).forEach((step, i) => expect(step.from).toBe(steps[i]!.to));
    const stored = steps[steps.length - 1]!;
    expect(stored.from).toBeCloseTo(stored.to, 12);
  });
  it('climbs where the reversible heat is below nought', () => {
    const step = ledgerSteps(ledger).find(({ name }) => name === 'reversible')!;
    expect(step.to).toBeGreaterThan(step.from);
  });
  it('shows a remainder that does not round to 0.00, and a boost converter that lost something', () => {
    const names = (change: Partial<EnergyLedger>) => ledgerSteps({ ...ledger, ...change }).map(({ name }) => name);
    expect(names({})).not.toContain('remainder');
    expect(names({ remainderKwh: 0.012 })).toContain('remainder');
    expect(names({ boostLossKwh: 0.3 })).toContain('boost');
  });
  it('breaks off under its lowest step, never under nought', () => {
    expect(ledgerFoot(ledgerSteps(ledger))).toBeLessThan(17.4);
    expect(ledgerFoot(ledgerSteps(ledger))).toBeGreaterThan(16);
  });
});
