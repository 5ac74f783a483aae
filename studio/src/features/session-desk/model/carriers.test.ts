import { partIssues, quantities, type Quantity, type SessionStudyInput } from '@voltiplano/engine';
import fc from 'fast-check';
import { beforeAll, expect, test } from 'vitest';
import { quantityPathOf } from '../../../components/fields/measure.ts';
import { valueAt, withValueAt } from '../../../lib/study-path.ts';
import { carriedStudy, carrierFor, sessionPartKinds, type PartBody, type SessionPartKind } from './carriers.ts';
import { studyIssues } from './checked-study.ts';
import { examples } from '../../../lib/examples.ts';

let studies: SessionStudyInput[];
beforeAll(async () => {
  studies = await Promise.all(examples.map((example) => example.load()));
});

/** Paths of every number of a part, such as `strategy.taper.steps[2].value`. */
function numberPaths(value: unknown, path: string): string[] {
  if (typeof value === 'number') return [path];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([name, inner]) =>
    numberPaths(inner, Array.isArray(value) ? `${path}[${name}]` : `${path}.${name}`),
  );
}

/** A part with some of its numbers moved anywhere within their ranges, and some of its optional members gone. */
function varied(study: SessionStudyInput, kind: SessionPartKind, seeds: [number, number][]): PartBody {
  const paths = numberPaths(study[kind], kind);
  const moved = seeds.reduce<unknown>((now, [where, share]) => {
    const path = paths[Math.floor(where * paths.length)]!;
    const name = quantityPathOf(path);
    if (!name || valueAt(now, path) === undefined) return now;
    const { min, max, integer }: Quantity = quantities[name];
    const value = share < 0.05 ? undefined : min + (max - min) * share ** 3;
    return withValueAt(now, path, integer && value !== undefined ? Math.round(value) : value);
  }, study);
  return valueAt(moved, kind) as PartBody;
}

test('carriedStudy makes a study that can be run of every part that can stand alone, on every example', () => {
  const share = fc.double({ min: 0, max: 1, maxExcluded: true, noNaN: true });
  const seeds = fc.array(fc.tuple(share, share), { maxLength: 4 });
  const index = fc.nat({ max: examples.length - 1 });
  let tried = 0;
  fc.assert(
    fc.property(index, index, fc.constantFrom(...sessionPartKinds), seeds, (from, on, kind, moves) => {
      const source = studies[from]!;
      if (!source[kind]) return;
      const body = varied(source, kind, moves);
      if (partIssues(kind, body).length > 0) return;
      tried++;
      const study = carriedStudy(studies[on]!, kind, body);
      expect(studyIssues(study)).toEqual([]);
      expect(study[kind]).toBe(body);
    }),
    { numRuns: 1500 },
  );
  expect(tried).toBeGreaterThan(300);
});

test('carriedStudy gives way to a part that its own rules allow, and never changes it', () => {
  const [van] = studies as [SessionStudyInput];
  const high = { ...van.strategy, cellVoltageCeilingV: 9 };
  expect(carriedStudy(van, 'strategy', high).cell.vMaxV).toBe(9);
  const low = { ...van.strategy, cellVoltageCeilingV: 0.6 };
  expect(carriedStudy(van, 'strategy', low).cell.vMinV).toBe(0);
  const { anode: _anode, ...cell } = { ...van.cell, vMaxV: 3.5 };
  expect(carriedStudy(van, 'cell', cell).strategy).toMatchObject({ cellVoltageCeilingV: 3.5 });
  expect(carriedStudy(van, 'cell', cell).strategy.anodeMarginMv).toBeUndefined();
  const bare = { ...van, pack: { ...van.pack, structureJPerK: 0 } };
  const thin = { ...van.thermal, surfaceShare: 0 };
  expect(carriedStudy(bare, 'thermal', thin).pack.structureJPerK).toBeGreaterThan(0);
});

test('carrierFor chooses the example whose class the part belongs to', () => {
  const title = (kind: SessionPartKind, body: unknown) => carrierFor(kind, body as PartBody).title;
  for (const study of studies) {
    if (study.title?.startsWith('Suri at Salar Cima, map')) {
      expect(title('pack', study.pack)).toBe('Suri, full power');
      expect(title('station', study.station)).toBe('Suri, full power');
      expect(title('strategy', study.strategy)).toBe('Suri, full power');
    }
    if (study.title?.startsWith('Vicuña town')) {
      expect(title('cell', study.cell)).toBe('Vicuña town, LFP');
      expect(title('strategy', study.strategy)).toBe('Vicuña town, LFP');
    }
    expect(title('thermal', study.thermal)).toBe('Vicuña, warm arrival');
  }
  expect(title('strategy', studies[0]!.strategy)).toBe('Vicuña, warm arrival');
});
