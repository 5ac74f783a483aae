import { parseSessionStudy, simulateSession } from '@voltiplano/engine';
import { describe, expect, it } from 'vitest';
import warmArrival from '../../../examples/vicuna-warm-arrival.json';
import { unitsOf } from '../lib/units.ts';
import { stripColumns } from './strip-columns.ts';
import { stripLayout } from './strip-layout.ts';
import { stripSpecs } from './strip-specs.ts';
import { stripsFigure } from './strips-figure.ts';

const units = unitsOf({ temperature: '°F', distance: 'mi' });
const { result } = simulateSession(parseSessionStudy(warmArrival));
const live = stripColumns(result, units);
const layout = stripLayout(
  1020,
  stripSpecs(units).map((spec) => ({ spec, range: spec.range([live], {}) })),
);
const figure = (baseline: typeof live | null) =>
  stripsFigure({ live, baseline, axis: 'time', range: [0, 60], layout, color: (token) => token, zooms: true });

describe('stripColumns', () => {
  it('counts the energy and the distance as the metrics do', () => {
    const row = live.min.findIndex((minute) => minute >= 20);
    // Trapezoids on a 10 s grid against the engine's own integral: the curvature between rows is far below 0.1 %.
    expect(live.kwhIn[row]! / result.metrics.batteryKwhAfterMin['20']).toBeCloseTo(1, 3);
    expect(live.distance[row]! / units.distance(result.metrics.kmAfterMin['20'])).toBeCloseTo(1, 3);
  });
  it('shows temperatures in the unit chosen', () => {
    expect(Math.max(...live.core)).toBeCloseTo(units.temperature(result.metrics.hottestCoreC), 1);
  });
});

describe('stripsFigure', () => {
  it('puts every axis where the drawing over it has its strip', () => {
    const { layout: drawn } = figure(null);
    const plotHeight = layout.plotBottom - layout.plotTop;
    layout.strips.forEach((strip, i) => {
      const axis = drawn[`yaxis${i === 0 ? '' : i + 1}` as 'yaxis'] as { domain: [number, number]; range: number[] };
      expect(layout.plotTop + (1 - axis.domain[1]) * plotHeight).toBeCloseTo(strip.top, 6);
      expect(layout.plotTop + (1 - axis.domain[0]) * plotHeight).toBeCloseTo(strip.top + strip.height, 6);
      expect(axis.range).toEqual(strip.range);
    });
  });
  it('draws the baseline behind, one line per strip', () => {
    expect(figure(live).data.length - figure(null).data.length).toBe(layout.strips.length);
    expect(figure(live).data[0]).toMatchObject({ line: { color: '--base' } });
  });
});
