import type { LimitCode, SessionResult, SessionStudy } from '../src/index.ts';

/** What a limit leaves unused at a row, in its own unit (A, W or V), and the size to hold that against; null: no limit. */
export type Bound = { room: number; scale: number } | null;
export type Bounds = Record<LimitCode, Bound>;

const clamp01 = (value: number) => Math.min(1, Math.max(0, value));

function linear(x: readonly number[], y: readonly number[], at: number): number {
  if (at <= x[0]) return y[0];
  if (at >= x.at(-1)!) return y.at(-1)!;
  const i = x.findIndex((edge) => edge > at) - 1;
  return y[i] + ((y[i + 1] - y[i]) * (at - x[i])) / (x[i + 1] - x[i]);
}

/**
 * The limits of engine/MODEL.md, section 6, read from the rows of a result alone, by formulas of this file's own.
 * A limit on the pack's side asks nothing where no current flows in: it never goes below 0 A.
 */
export function boundsAt(study: SessionStudy, result: SessionResult, row: number): Bounds {
  const { series } = result;
  const { station, strategy, pack, cell } = study;
  const tS = series.tS[row];
  const I = series.packCurrentA[row];
  const Id = series.stationCurrentA[row];
  const current = (most: number, value = I): Bound => ({ room: most - value, scale: 1 + most });
  const ifCharging = (room: number, scale: number): Bound => ({ room: I > 1e-9 ? room : Math.max(room, 0), scale });
  const boosted = result.events.some(({ event }) => event === 'boost');
  const ampereHours = pack.parallel * cell.capacityAh;
  const band = (from: number, to: number, at: number) => clamp01((to - at) / (to - from));
  return {
    'station-current': current(station.currentMaxA, Id),
    'station-power': powerBound(study, result, row, boosted),
    'station-voltage': boosted
      ? null
      : { room: Id > 1e-9 ? station.voltageMaxV - series.stationVoltageV[row] : 0, scale: station.voltageMaxV },
    'station-ramp': current(station.rampAPerS * tS, Id),
    inlet: inletBound(study, series.inletC[row], Id),
    'pack-current': current(pack.chargeCurrentMaxA),
    'cell-voltage': ifCharging(strategy.cellVoltageCeilingV - series.highestCellV[row], 1),
    taper: taperBound(study, result, row, ampereHours),
    anode:
      strategy.anodeMarginMv === undefined || cell.anode!.share === 0
        ? null
        : ifCharging(series.lowestAnodeV[row]! - strategy.anodeMarginMv / 1000, 1),
    hot: current(
      pack.chargeCurrentMaxA * band(strategy.hotDerate.fromC, strategy.hotDerate.toC, series.hottestSurfaceC[row]),
    ),
    cold: strategy.coldLimit
      ? current(linear(strategy.coldLimit.tempC, strategy.coldLimit.cRate, series.coldestSurfaceC[row]) * ampereHours)
      : null,
  };
}

function inletBound({ inlet }: SessionStudy, inletC: number, Id: number): Bound {
  if (inlet?.currentMaxA === undefined) return null;
  const most = inlet.currentMaxA * clamp01((inlet.derateToC - inletC) / (inlet.derateToC - inlet.derateFromC));
  return { room: most - Id, scale: 1 + inlet.currentMaxA };
}

/** The station's power, or its latest step; on the moment of a step the row before it still stands under the old one. */
function powerBound(study: SessionStudy, { series }: SessionResult, row: number, boosted: boolean): Bound {
  const { station, boost } = study;
  const tS = series.tS[row];
  const before = series.tS[row + 1] === tS;
  const steps = (station.powerSteps ?? []).filter(({ atMin }) => (before ? atMin * 60 < tS : atMin * 60 <= tS));
  const kw = Math.min(station.powerMaxKw, steps.at(-1)?.powerKw ?? Infinity);
  const room = kw - series.stationPowerKw[row];
  if (!boosted) return { room, scale: 1 + kw };
  const converted = series.batteryPowerKw[row] + series.auxiliaryW[row] / 1000;
  return { room: Math.min(room, boost!.powerMaxKw - converted), scale: 1 + kw };
}

/** The strategy's table. Ledges are counted from the events; on a ledge's own moment the first row is before it. */
function taperBound(study: SessionStudy, result: SessionResult, row: number, ampereHours: number): Bound {
  const { taper } = study.strategy;
  if (taper.shape === 'none') return null;
  const { series, events } = result;
  const value = () => {
    if (taper.shape === 'slope') {
      const socs = taper.points.map((point) => point.soc);
      return linear(
        socs,
        taper.points.map((point) => point.value),
        series.soc[row],
      );
    }
    if (taper.shape === 'map') {
      const columns = taper.tempC.map((_, j) =>
        linear(
          taper.soc,
          taper.values.map((values) => values[j]),
          series.soc[row],
        ),
      );
      return linear(taper.tempC, columns, series.coldestSurfaceC[row]);
    }
    return taper.steps[ledgeAt(study, events, series.tS, row)].value;
  };
  const most = value() * (taper.unit === 'C' ? ampereHours : 1);
  const used = taper.unit === 'kW' ? series.batteryPowerKw[row] : series.packCurrentA[row];
  return { room: most - used, scale: 1 + most };
}

function ledgeAt(study: SessionStudy, events: SessionResult['events'], tS: readonly number[], row: number): number {
  const before = tS[row + 1] === tS[row] && tS[row] > 0;
  const taken = events.filter(
    (one) => one.event.startsWith('ledge:') && (before ? one.tS < tS[row] : one.tS <= tS[row]),
  );
  if (taken.length > 0) return Number(taken.at(-1)!.event.slice(6)) - 1;
  const { taper } = study.strategy;
  if (taper.shape !== 'ledges') return 0;
  return Math.max(
    0,
    taper.steps.findLastIndex((step) => step.fromSoc <= study.session.startSoc),
  );
}
