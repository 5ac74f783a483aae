import type { SessionStudy, Taper } from '../study/schema.ts';
import type { SweepPart } from '../study/sweep-schema.ts';
import { isFactor, keysOf, withValue } from './input-path.ts';

/** One thing that a cell has other than the base study. */
export type Change =
  | { kind: 'value'; path: string; label: string; unit: string; value: number }
  | { kind: 'part'; part: SweepPart; label: string; name: string; body: object | null };

/**
 * A study with changes made: whole parts first, then single values, factors last, so that a value set inside a part that
 * is swept too goes into that part. The base is not changed; the rules between parts are not checked.
 */
export function changeStudy(base: SessionStudy, changes: readonly Change[]): SessionStudy {
  let study = base;
  for (const change of changes) if (change.kind === 'part') study = withPart(study, change);
  const values = changes.filter((change) => change.kind === 'value');
  for (const { path, value } of values) if (!isFactor(path)) study = withValue(study, keysOf(path), value);
  for (const { path, value } of values) {
    if (path === 'strategy.taper.factor') study = withTaper(study, value);
    if (path === 'cell.resistanceFactor') study = withResistance(study, value);
  }
  return study;
}

function withPart(study: SessionStudy, { part, body }: Change & { kind: 'part' }): SessionStudy {
  const { [part]: _, ...rest } = study;
  return (body === null ? rest : { ...rest, [part]: body }) as SessionStudy;
}

function withTaper(study: SessionStudy, factor: number): SessionStudy {
  return { ...study, strategy: { ...study.strategy, taper: scaled(study.strategy.taper, factor) } };
}

function scaled(taper: Taper, factor: number): Taper {
  const times = <T extends { value: number }>(row: T): T => ({ ...row, value: row.value * factor });
  switch (taper.shape) {
    case 'none':
      return taper;
    case 'slope':
      return { ...taper, points: taper.points.map(times) };
    case 'ledges':
      return { ...taper, steps: taper.steps.map(times) };
    case 'voltage-ledges':
      return { ...taper, steps: taper.steps.map(times) };
    case 'map':
      return { ...taper, values: taper.values.map((row) => row.map((value) => value * factor)) };
  }
}

function withResistance(study: SessionStudy, factor: number): SessionStudy {
  const { cell } = study;
  const rcPairs = cell.rcPairs.map((pair) => ({ ...pair, rMilliohm: pair.rMilliohm * factor }));
  return { ...study, cell: { ...cell, r0Milliohm: cell.r0Milliohm * factor, rcPairs } };
}
