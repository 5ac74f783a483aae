import type { SessionStudy, SessionStudyInput } from '../study/schema.ts';
import type { SweepPart } from '../study/sweep-schema.ts';
import { changeStudy, type Change } from './change-study.ts';

/** An axis of numbers: the values of one input. */
export type NumberAxis = { kind: 'number'; path: string; label: string; unit: string; values: number[] };
/** An axis of whole parts. */
export type PartAxis = {
  kind: 'part';
  part: SweepPart;
  label: string;
  unit: '';
  items: { name: string; body: object | null }[];
};
export type SweepAxis = NumberAxis | PartAxis;

/** One input of a sensitivity: its value in the base and the two it is moved to. */
export type MovedInput = {
  path: string;
  label: string;
  unit: string;
  baseValue: number;
  minusValue: number;
  plusValue: number;
};
/** One input of a spread and its value in every run. */
export type SampledInput = { path: string; label: string; unit: string; samples: Float64Array };

type Head = {
  title: string;
  /** The study that is varied, checked, its defaults filled in. */
  base: SessionStudy;
  /** How many runs it takes. */
  size: number;
  /** Names what is computed: plans of the same hash have the same cells in the same order. Titles are not in it. */
  hash: string;
  /** Names of what each run is asked for: see `sweepMetrics`; a spread adds its curve. */
  columns: string[];
};

export type GridPlan = Head & { kind: 'grid'; axes: SweepAxis[] };
/** Cell 0 is the base; input i has cells 1 + 2i (minus) and 2 + 2i (plus). */
export type SensitivityPlan = Head & { kind: 'sensitivity'; inputs: MovedInput[] };
export type SpreadPlan = Head & { kind: 'spread'; inputs: SampledInput[]; seed: number };

/**
 * What `parseSweep` makes of a sweep file: every run it asks for, by number. Plain data, so that it can be sent to a
 * worker.
 */
export type SweepPlan = GridPlan | SensitivityPlan | SpreadPlan;

export const lengthOf = (axis: SweepAxis): number => (axis.kind === 'number' ? axis.values.length : axis.items.length);

/** Where a cell stands on each axis, counted from 0. Row-major: the last axis runs fastest. */
export function coordinatesOf(axes: readonly SweepAxis[], index: number): number[] {
  const at = new Array<number>(axes.length);
  let rest = index;
  for (let axis = axes.length - 1; axis >= 0; axis--) {
    const length = lengthOf(axes[axis]);
    at[axis] = rest % length;
    rest = Math.floor(rest / length);
  }
  return at;
}

/** The number of the cell at given coordinates; the inverse of `coordinatesOf`. */
export function indexAt(axes: readonly SweepAxis[], at: readonly number[]): number {
  return axes.reduce((index, axis, i) => index * lengthOf(axis) + at[i], 0);
}

/** What a cell has other than the base study; nothing for the base itself. */
export function changesOf(plan: SweepPlan, index: number): Change[] {
  if (!(index >= 0 && index < plan.size && Number.isInteger(index)))
    throw new RangeError(`Cell ${index} is not one of the ${plan.size} of this sweep`);
  switch (plan.kind) {
    case 'grid': {
      const at = coordinatesOf(plan.axes, index);
      return plan.axes.map((axis, i) => changeAt(axis, at[i]));
    }
    case 'sensitivity': {
      if (index === 0) return [];
      const input = plan.inputs[(index - 1) >> 1];
      return [valueOf(input, index % 2 === 1 ? input.minusValue : input.plusValue)];
    }
    case 'spread':
      return plan.inputs.map((input) => valueOf(input, input.samples[index]));
  }
}

function changeAt(axis: SweepAxis, i: number): Change {
  if (axis.kind === 'number') return valueOf(axis, axis.values[i]);
  return { kind: 'part', part: axis.part, label: axis.label, ...axis.items[i] };
}

function valueOf({ path, label, unit }: { path: string; label: string; unit: string }, value: number): Change {
  return { kind: 'value', path, label, unit, value };
}

/** The study of a cell, to be opened or run by itself; its title says where it stands. */
export function cellStudy(plan: SweepPlan, index: number): SessionStudyInput {
  const changes = changesOf(plan, index);
  return { ...changeStudy(plan.base, changes), title: titleOf(plan, changes) };
}

const MOST_TITLE = 300;

function titleOf({ title, base }: SweepPlan, changes: readonly Change[]): string {
  const whole = [base.title ?? title, ...changes.map(changeText)].filter((text) => text !== '').join('; ');
  return whole.length > MOST_TITLE ? `${whole.slice(0, MOST_TITLE - 1)}…` : whole;
}

/** `Ambient −10 °C`, or `Station Salar Tola 500 A`. */
export function changeText(change: Change): string {
  if (change.kind === 'part') return `${change.label} ${change.name}`;
  return `${change.label} ${numberText(change.value)}${change.unit ? ` ${change.unit}` : ''}`;
}

/** A number as a person reads it: up to six digits, a real minus sign. */
export function numberText(value: number): string {
  return String(Number(value.toPrecision(6))).replace('-', '−');
}
