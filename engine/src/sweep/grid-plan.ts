import type { SessionStudy } from '../study/schema.ts';
import { show } from '../study/study-error.ts';
import { MOST_CELLS, type AxisRequest, type PartAxisRequest, type SweepPart } from '../study/sweep-schema.ts';
import { changeStudy } from './change-study.ts';
import { checkDistinct, checkValue, requireInput, type SweepIssues } from './check-input.ts';
import { inputAt, keysOf } from './input-path.ts';
import { lengthOf, type PartAxis, type SweepAxis } from './sweep-plan.ts';

type NumberRequest = Exclude<AxisRequest, PartAxisRequest>;

const PART_LABELS: Record<SweepPart, string> = {
  cell: 'Cell',
  pack: 'Pack',
  thermal: 'Cooling',
  inlet: 'Inlet',
  boost: 'Boost',
  station: 'Station',
  strategy: 'Strategy',
};

/** The axes of a sweep with every value written out; what is wrong with them goes to `issues`. */
export function gridAxes(base: SessionStudy, requests: readonly AxisRequest[], issues: SweepIssues): SweepAxis[] {
  const parts = requests.flatMap((request) => ('part' in request ? [partAxis(request)] : []));
  const axes = requests.map((request, i) => {
    const at = `sweep.axes[${i}]`;
    return 'part' in request ? checkedPartAxis(issues, at, request) : numberAxis(issues, at, base, parts, request);
  });
  checkDistinct(
    issues,
    requests.map((request, i) =>
      'part' in request
        ? { at: `sweep.axes[${i}].part`, path: request.part }
        : { at: `sweep.axes[${i}].path`, path: request.path },
    ),
  );
  checkSize(issues, axes);
  return axes;
}

function partAxis({ part, items }: PartAxisRequest): PartAxis {
  return { kind: 'part', part, label: PART_LABELS[part], unit: '', items };
}

function checkedPartAxis(issues: SweepIssues, at: string, request: PartAxisRequest): PartAxis {
  const names = request.items.map((item) => item.name);
  const again = names.findIndex((name, i) => names.indexOf(name) < i);
  if (again >= 0)
    issues.add(
      `${at}.items[${again}].name`,
      'repeated',
      `must differ from the others, but is ${show(names[again])} again`,
    );
  return partAxis(request);
}

function numberAxis(
  issues: SweepIssues,
  at: string,
  base: SessionStudy,
  parts: readonly PartAxis[],
  request: NumberRequest,
): SweepAxis {
  const { path } = request;
  const values = 'values' in request ? request.values : rangeValues(issues, at, request);
  const replaced = parts.find(({ part }) => part === keysOf(path)[0]);
  const study = replaced ? changeStudy(base, [{ ...replaced, ...replaced.items[0] }]) : base;
  const input = requireInput(issues, `${at}.path`, study, path);
  if (input === null) return { kind: 'number', path, label: path, unit: '', values };
  if (replaced) checkInItems(issues, at, base, replaced, path, input.unit);
  if ('values' in request) {
    values.forEach((value, i) => checkValue(issues, `${at}.values[${i}]`, input, value));
    const again = values.findIndex((value, i) => values.indexOf(value) < i);
    if (again >= 0)
      issues.add(`${at}.values[${again}]`, 'repeated', `must differ from the others, but is ${values[again]} again`);
  } else {
    checkValue(issues, `${at}.from`, input, request.from);
    checkValue(issues, `${at}.to`, input, request.to);
    const broken = input.quantity.integer && values.find((value) => !Number.isInteger(value));
    if (broken)
      issues.add(`${at}.count`, 'whole-number', `makes ${broken} of ${input.label}, which takes whole numbers`);
  }
  return { kind: 'number', path, label: input.label, unit: input.unit, values };
}

/** An input inside a part that is swept too must stand in every item of that part, in the same unit. */
function checkInItems(
  issues: SweepIssues,
  at: string,
  base: SessionStudy,
  axis: PartAxis,
  path: string,
  unit: string,
): void {
  const without = axis.items.find((item) => inputAt(changeStudy(base, [{ ...axis, ...item }]), path)?.unit !== unit);
  if (without === undefined) return;
  const text = `names ${path}, which ${axis.part} ${show(without.name)} on another axis does not have in this unit`;
  issues.add(`${at}.path`, 'absent', text, path);
}

type Range = Extract<NumberRequest, { from: number }>;

/** Values of a range, ends included, rounded to twelve digits so that steps of a tenth read as such. */
function rangeValues(issues: SweepIssues, at: string, { from, to, count, scale }: Range): number[] {
  if (from === to) issues.add(`${at}.to`, 'empty-range', `must differ from from (${from}), but is ${to}`, to);
  if (scale === 'log' && !(from > 0 && to > 0)) {
    const [name, value] = from > 0 ? ['to', to] : ['from', from];
    issues.add(`${at}.${name}`, 'log-needs-positive', `must be above 0 on a log scale, but is ${value}`, value);
    return [from, to];
  }
  const share = (i: number) => i / (count - 1);
  const value = (i: number) => (scale === 'log' ? from * Math.pow(to / from, share(i)) : from + (to - from) * share(i));
  return Array.from({ length: count }, (_, i) => (i === count - 1 ? to : Number(value(i).toPrecision(12))));
}

function checkSize(issues: SweepIssues, axes: readonly SweepAxis[]): void {
  const lengths = axes.map(lengthOf);
  const size = lengths.reduce((product, length) => product * length, 1);
  if (size <= MOST_CELLS) return;
  const made = lengths.join(' × ');
  issues.add('sweep.axes', 'too-many-cells', `must make at most ${MOST_CELLS} cells, but make ${size} (${made})`, size);
}
