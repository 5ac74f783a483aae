import type { ThermalAnalysis } from '@voltiplano/engine';
import { formatNumber } from '../../../lib/format.ts';
import type { Units } from '../../../lib/units.ts';

/** What the thermal network says of itself, in sentences. */
export function heatWords(thermal: ThermalAnalysis, units: Units): string[] {
  const { timeConstantsS, steady, note, heatSoakedMin } = thermal;
  const sentences = [soaked(heatSoakedMin, timeConstantsS)];
  const degrees = (celsius: number) => `${formatNumber(units.temperature(celsius), 1)} ${units.temperatureUnit}`;
  if (steady) {
    const heat = `${formatNumber(steady.heatW / 1000, 2)} kW`;
    sentences.push(
      `Under this session’s mean heat of ${heat}, held for ever, the hottest core would settle at ${degrees(steady.hottestCoreC)} and the hottest surface at ${degrees(steady.hottestSurfaceC)}, with coolant in at ${degrees(steady.coolantInC)} and out at ${degrees(steady.coolantOutC)}.`,
    );
  }
  return note ? [...sentences, note] : sentences;
}

function soaked(minutes: number, timeConstantsS: number[]): string {
  if (!Number.isFinite(minutes)) return 'Nothing carries heat out of the pack, so it never settles.';
  const [slowest, ...faster] = timeConstantsS.map((tau) => duration(tau));
  const others = faster.length > 0 ? `, the fastest ${faster.at(-1)}` : '';
  return `Heat-soaked in about ${formatNumber(minutes, minutes < 10 ? 1 : 0)} min: 95 % of the way after three of the slowest time constant, ${slowest}${others}.`;
}

function duration(seconds: number): string {
  return seconds < 90 ? `${formatNumber(seconds, 0)} s` : `${formatNumber(seconds / 60, 1)} min`;
}
