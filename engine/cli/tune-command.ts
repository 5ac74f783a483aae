import {
  parseTuneRequest,
  StudyError,
  tuneTaper,
  type BoundReading,
  type Holding,
  type TuneResult,
} from '../src/index.ts';

/**
 * Tunes the taper of a request file.
 *
 * @param text  the file's content
 * @throws {StudyError} `NOT_JSON`, or as `parseTuneRequest` and `tuneTaper`
 */
export function tuneFromText(text: string): TuneResult {
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (error) {
    const message = `Cannot read this file as JSON: ${(error as Error).message}`;
    throw new StudyError('NOT_JSON', [{ path: 'tune', rule: 'json', message }]);
  }
  return tuneTaper(parseTuneRequest(json));
}

const CAUTION =
  'A simulation is not a test. Results are estimates for engineering study; they do not replace the cell maker’s limits,\n' +
  'abuse testing, functional-safety work or the judgement of qualified engineers.';

/** A tuning on one screen: the verdict, the taper and what holds each part, how close the bounds came, the trade-off, the caution. */
export function tuneSummary(result: TuneResult): string {
  const { title, message, taper, closest, effort } = result;
  const unit = taper === null || taper.shape === 'none' ? '' : taper.unit;
  const lines = [
    title || 'Untitled tuning',
    message,
    ...(taper === null ? [] : ['', `Taper (${unit}), and what holds it`, ...result.parts.map(partLine)]),
    ...(closest.length > 0 ? ['', 'Bounds, over all conditions', ...closest.map((one) => boundLine(result, one))] : []),
    ...conditionLines(result),
    ...tradeOffLines(result),
    '',
    `${effort.runs} runs`,
    '',
    CAUTION,
  ];
  return `${lines.join('\n')}\n`;
}

function partLine({ fromSoc, toSoc, value, holds }: TuneResult['parts'][number]): string {
  const range = `${fixed(100 * fromSoc, 1)}–${fixed(100 * toSoc, 1)} %`;
  return `  ${range.padEnd(15)}${String(value).padStart(8)}   ${holdsText(holds)}`;
}

function holdsText(holds: Holding): string {
  switch (holds.by) {
    case 'bound':
      return `${holds.bound}, at ${fixed(holds.atMin, 1)} min`;
    case 'limits':
      return holds.limits.length > 0 ? `${holds.limits[0].code}: raising it changes nothing` : 'not reached';
    case 'order':
      return 'the part before it';
    case 'nothing':
      return 'nothing within 1 %';
  }
}

function boundLine(
  { proofs }: TuneResult,
  { bound, limit, unit, digits, value, condition, atMin }: BoundReading,
): string {
  const where = proofs.length > 1 ? `, ${proofs[condition].name}` : '';
  return `  ${bound.padEnd(20)}${fixed(limit, digits).padStart(8)} ${unit.padEnd(3)} came to ${fixed(value, digits)} at ${fixed(atMin, 1)} min${where}`;
}

function conditionLines({ proofs, goal }: TuneResult): string[] {
  if (proofs.length < 2) return [];
  const line = ({ name, goal: { tuned, present } }: TuneResult['proofs'][number]) =>
    `  ${name.padEnd(30)}${amount(tuned, goal.unit)} (present ${amount(present, goal.unit)})`;
  return ['', 'Conditions', ...proofs.map(line)];
}

function tradeOffLines({ tradeOff, goal }: TuneResult): string[] {
  if (tradeOff === null) return [];
  const line = ({ limit, goal: value }: (typeof tradeOff.points)[number]) =>
    `  ${String(limit).padStart(8)} ${tradeOff.unit.padEnd(4)}${amount(value, goal.unit)}`;
  return ['', `Against ${tradeOff.bound}`, ...tradeOff.points.map(line)];
}

const fixed = (value: number, digits: number) => value.toFixed(digits).replace('-', '−');
const amount = (value: number | null, unit: string) => (value === null ? 'not reached' : `${fixed(value, 2)} ${unit}`);
