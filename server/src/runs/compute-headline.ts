import {
  parseStudy,
  runStudy,
  type SessionResult,
  StudyError,
  type StudyResult,
  type TripResult,
} from '@voltiplano/engine';
import type { Headline } from '../contract/study.ts';
import { limitSpans } from './limit-spans.ts';
import { type CurvePoint, thinCurve } from './thin-curve.ts';

type Numbers = NonNullable<Headline['numbers']>;
type Section = NonNullable<Headline['section']>;

/** What a drawing some 100 px wide can show. */
const SECTION_POINTS = 96;
/** Three seconds: narrower than a pixel of that drawing for sessions of five minutes and more [min]. */
const SHORTEST_SPAN_MIN = 0.05;

/**
 * Runs a study and keeps what lists show of it. The same inputs give the same headline.
 *
 * @param inputs  a study file; one that cannot be read or run gives a headline that says why
 */
export function computeHeadline(inputs: unknown, engineVersion: string): Headline {
  try {
    return { engineVersion, ...headlineOf(runStudy(parseStudy(inputs))) };
  } catch (error) {
    if (error instanceof StudyError) return failedHeadline(error.message, engineVersion);
    throw error;
  }
}

/** The headline of a study of which there are no numbers. @param failure  why, in words */
export function failedHeadline(failure: string, engineVersion: string): Headline {
  return { engineVersion, failure, numbers: null, section: null };
}

function headlineOf(result: StudyResult): Omit<Headline, 'engineVersion'> {
  if (result.kind === 'session') {
    return { failure: null, numbers: sessionNumbers(result), section: sessionSection(result) };
  }
  if (result.failure) return { failure: result.failure.message, numbers: null, section: null };
  return { failure: null, numbers: tripNumbers(result), section: null };
}

function sessionNumbers({ metrics, energyLedger }: SessionResult): Numbers {
  return {
    endMin: metrics.endMin,
    endSoc: metrics.endSoc,
    minutes0To50: metrics.minutes0To50,
    minutes10To80: metrics.minutes10To80,
    minutes0To100: metrics.minutes0To100,
    peakStationPowerKw: metrics.peakStationPowerKw,
    meanStationPower10To80Kw: metrics.meanStationPower10To80Kw,
    kmIn10Min: metrics.kmAfterMin['10'],
    kmIn20Min: metrics.kmAfterMin['20'],
    hottestCoreC: metrics.hottestCoreC,
    lowestAnodeMv: metrics.lowestAnodeMv,
    stationKwh: energyLedger.stationKwh,
    storedKwh: energyLedger.storedKwh,
  };
}

/** Of a whole trip; what only a single session has is null, and so is what stations gave where the trip has no stop. */
function tripNumbers({ totalMin, legs, stops }: TripResult): Numbers {
  const sessions = stops.map(({ session }) => session);
  const anodes = sessions.flatMap(({ metrics }) => metrics.lowestAnodeMv ?? []);
  const cores = [...legs, ...sessions.map(({ metrics }) => metrics)].map(({ hottestCoreC }) => hottestCoreC);
  return {
    endMin: totalMin,
    endSoc: legs.at(-1)?.endSoc ?? 0,
    minutes0To50: null,
    minutes10To80: null,
    minutes0To100: null,
    peakStationPowerKw: largest(sessions.map(({ metrics }) => metrics.peakStationPowerKw)),
    meanStationPower10To80Kw: null,
    kmIn10Min: null,
    kmIn20Min: null,
    hottestCoreC: largest(cores),
    lowestAnodeMv: anodes.length === 0 ? null : Math.min(...anodes),
    stationKwh: sum(sessions.map(({ energyLedger }) => energyLedger.stationKwh)),
    storedKwh: sum(sessions.map(({ energyLedger }) => energyLedger.storedKwh)),
  };
}

function sessionSection({ metrics, events, series }: SessionResult): Section {
  const { endMin, peakStationPowerMin, peakStationPowerKw } = metrics;
  const curve = series.tS.map((tS, row): CurvePoint => [tS / 60, series.stationPowerKw[row] ?? 0]);
  const points = thinCurve(withPeak(curve, [peakStationPowerMin, peakStationPowerKw]), SECTION_POINTS);
  return {
    endMin,
    points: points.map(([min, kw]): CurvePoint => [rounded(min, 4), rounded(kw, 3)]),
    limits: limitSpans(events, endMin, SHORTEST_SPAN_MIN).map(({ limit, fromMin, toMin }) => ({
      limit,
      fromMin: rounded(fromMin, 4),
      toMin: rounded(toMin, 4),
    })),
  };
}

/** The peak lies between two rows of the output grid as a rule. */
function withPeak(curve: readonly CurvePoint[], peak: CurvePoint): CurvePoint[] {
  if (curve.some(([, kw]) => kw >= peak[1])) return [...curve];
  const behind = curve.findIndex(([min]) => min > peak[0]);
  return behind < 0 ? [...curve, peak] : [...curve.slice(0, behind), peak, ...curve.slice(behind)];
}

function largest(values: readonly number[]): number | null {
  return values.length === 0 ? null : Math.max(...values);
}

function sum(values: readonly number[]): number | null {
  return values.length === 0 ? null : values.reduce((total, value) => total + value, 0);
}

function rounded(value: number, digits: number): number {
  return Number(value.toFixed(digits));
}
