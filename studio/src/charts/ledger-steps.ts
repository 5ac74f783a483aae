import type { EnergyLedger } from '@voltiplano/engine';

/** A level of the plateau (an amount of energy) or a ledge (a loss); `from` and `to` are heights [kWh]. */
export type LedgerStep = { name: string; kind: 'level' | 'loss'; kwh: number; from: number; to: number };

/**
 * The ledger as a way down from the grid to the cells. A loss below nought climbs. The boost converter stands there
 * where there is one, the remainder where it does not round to 0.00.
 */
export function ledgerSteps(ledger: EnergyLedger): LedgerStep[] {
  const losses = (...rows: [name: string, kwh: number][]) =>
    rows.map(([name, kwh]) => ({ name, kind: 'loss' as const, kwh }));
  const rows = [
    { name: 'grid', kind: 'level' as const, kwh: ledger.gridKwh },
    ...losses(['rectifier', ledger.rectifierLossKwh]),
    { name: 'station', kind: 'level' as const, kwh: ledger.stationKwh },
    ...losses(['inlet', ledger.inletKwh]),
    ...(ledger.boostLossKwh === 0 ? [] : losses(['boost', ledger.boostLossKwh])),
    ...losses(
      ['auxiliaries', ledger.auxiliariesKwh],
      ['busbar', ledger.busbarKwh],
      ['ohmic', ledger.ohmicKwh],
      ['polarisation', ledger.polarisationKwh],
      ['reversible', ledger.reversibleKwh],
      ['RC pairs', ledger.rcPairsKwh],
    ),
    ...(Math.abs(ledger.remainderKwh) < 0.005 ? [] : losses(['remainder', ledger.remainderKwh])),
    { name: 'stored', kind: 'level' as const, kwh: ledger.storedKwh },
  ];
  let height = ledger.gridKwh;
  return rows.map((row) => {
    const from = height;
    height = row.kind === 'loss' ? height - row.kwh : row.kwh;
    return { ...row, from, to: height };
  });
}

/** Height at which the drawing breaks off: under the lowest step by a quarter of the whole way down. */
export function ledgerFoot(steps: readonly LedgerStep[]): number {
  const heights = steps.map((step) => step.to);
  const top = Math.max(...heights);
  const low = Math.min(...heights);
  return Math.max(0, low - Math.max((top - low) * 0.27, top * 0.005));
}
