import { describe, expect, test } from 'vitest';
import suri from '../../../examples/suri-map-cool-evening.json';
import trip from '../../../examples/vicuna-one-leg.json';
import vicuna from '../../../examples/vicuna-warm-arrival.json';
import { partDifferences, studyDifferences, type Difference } from './study-differences.ts';
import { withValueAt } from './study-path.ts';

const change = (path: string, value: unknown, temperature: '°C' | '°F' = '°C', study: unknown = vicuna) =>
  studyDifferences(study, withValueAt(study, path, value), temperature);

/** A difference on one line, as tests read it. */
const line = (one: Difference) =>
  one.kind === 'value'
    ? `${one.section} / ${one.label}: ${one.before} → ${one.after} ${one.unit}`.trim()
    : [
        `${one.section} / ${one.label}`,
        ...one.rows.map(({ before, after, cells }) =>
          [`${before}→${after}`, ...cells.map((cell) => `${cell.before}${cell.differs ? `→${cell.after}` : ''}`)].join(
            ' ',
          ),
        ),
      ].join('; ');

describe('studyDifferences', () => {
  test('finds nothing between a study and a copy of it', () => {
    expect(studyDifferences(vicuna, structuredClone(vicuna), '°C')).toEqual([]);
  });

  test('says a number with its label, unit and path, in the units on screen', () => {
    expect(change('pack.chargeCurrentMaxA', 480)).toEqual([
      {
        kind: 'value',
        path: 'pack.chargeCurrentMaxA',
        section: 'Pack',
        label: 'Charge current, most',
        unit: 'A',
        before: '500',
        after: '480',
      },
    ]);
    expect(change('session.ambientC', 20, '°F').map(line)).toEqual(['Session / Ambient: 78.8 → 68.0 °F']);
    expect(change('pack.socWindow', [0.05, 0.97]).map(line)).toEqual(['Pack / Usable window, low: 3 → 5 % of z']);
  });

  test('leaves a side empty that does not have the field', () => {
    expect(change('strategy.anodeMarginMv', undefined).map(line)).toEqual(['Strategy / Anode margin: 28 → null mV']);
    expect(change('inlet', undefined).map(line)).toContain('Inlet / Inlet current, most: 500 → null A');
  });

  test('says words as words', () => {
    expect(change('title', 'Colder').map(line)).toEqual([` / Title: ${vicuna.title} → Colder`.trim()]);
    expect(change('strategy.name', 'Vicuña ledges 8').map(line)[0]).toMatch(/^Strategy \/ Name: .* → Vicuña ledges 8$/);
  });

  test('says a table by the rows that differ, added and deleted rows too', () => {
    const { steps } = vicuna.strategy.taper;
    const next = [steps[0], { fromSoc: 0.2, value: 480 }, { ...steps[1], value: 455 }, ...steps.slice(3)];
    const [table] = change('strategy.taper.steps', next);
    expect(line(table!)).toBe(
      `Strategy / Taper ledges; null→2 null→20 null→480; 2→3 ${steps[1]!.fromSoc * 100} ${steps[1]!.value}→455; 3→null ${steps[2]!.fromSoc * 100}→null ${steps[2]!.value}→null`,
    );
  });

  test('puts a taper of another shape beside the one before', () => {
    const lines = change('strategy.taper', { shape: 'slope', unit: 'C', points: [{ soc: 0, value: 2 }] }).map(line);
    expect(lines[0]).toBe('Strategy / Shape: ledges → slope');
    expect(lines[1]).toBe('Strategy / Numbers in: A → C');
    expect(lines[2]).toMatch(/^Strategy \/ Taper ledges; 1→null/);
    expect(lines[3]).toBe('Strategy / Taper points; null→1 null→0 null→2.00');
  });

  test('compares a map cell by cell, by its temperatures', () => {
    expect(change('strategy.taper.values[1][2]', 250, '°C', suri).map(line)).toEqual([
      'Strategy / Taper map; 2→2 20 38 105 245→250 262',
    ]);
    const [table] = change('strategy.taper', { ...suri.strategy.taper, tempC: [0, 15, 32, 45] }, '°C', suri);
    expect(table!.kind === 'table' && table!.columns.map(({ label }) => label)).toEqual([
      'Soc',
      '0 °C',
      '15 °C',
      '30 °C',
      '32 °C',
      '45 °C',
    ]);
  });

  test('says where a potential comes from, and its rows', () => {
    const lines = change('cell.ocv', { x: [0, 1], y: [3, 4.2] }).map(line);
    expect(lines).toEqual([
      'Cell / Rest voltage: NMC811 and graphite → A table over z',
      'Cell / Rest voltage; null→1 null→0.00 null→3.000; null→2 null→1.00 null→4.200',
    ]);
  });

  test('compares a trip leg by leg, and the stations at their ends', () => {
    const station = { name: 'Salar Abra 150', powerMaxKw: 150, currentMaxA: 400, voltageMaxV: 920 };
    const stop = withValueAt(trip, 'trip.legs[0].station', station);
    const legs = [
      { ...trip.trip.legs[0], station: { ...station, powerMaxKw: 120 }, depart: { rule: 'target', soc: 0.8 } },
      { km: 60, kmPerH: 80 },
    ];
    expect(studyDifferences(stop, withValueAt(stop, 'trip.legs', legs), '°C').map(line)).toEqual([
      'Trip / Legs; 1→1 148 104 620 12.0 of the trip Salar Abra 150 rule of the trip→at 80 %; null→2 null→60 null→80 null→0 null→0.0 null→of the trip null→none null→rule of the trip',
      'Station after leg 1 / Power, most: 150 → 120 kW',
    ]);
  });

  test('still shows what nobody has named', () => {
    expect(studyDifferences({ sweep: { runs: 3 } }, { sweep: { runs: 4 } }, '°C')).toEqual([
      { kind: 'value', path: 'sweep.runs', section: '', label: 'sweep.runs', unit: '', before: '3', after: '4' },
    ]);
  });
});

test('partDifferences reads a part by its kind, and lists all of it against nothing', () => {
  const { station } = vicuna;
  expect(partDifferences('station', station, { ...station, powerMaxKw: 90 }, '°C').map(line)).toEqual([
    `Station / Power, most: ${station.powerMaxKw} → 90 kW`,
  ]);
  const all = partDifferences('vehicle', undefined, trip.vehicle, '°C');
  expect(all.map(({ label }) => label)).toEqual([
    'Mass',
    'Drag area (CdA)',
    'Rolling coefficient',
    'Drive efficiency',
    'Regeneration efficiency',
    'Auxiliary load',
    'Cabin over ambient',
    'Cabin while stopped',
  ]);
  expect(partDifferences('route', { legs: [] }, { legs: trip.trip.legs }, '°C')).toHaveLength(1);
});
