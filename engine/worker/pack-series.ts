import type { SessionSeries } from '../src/index.ts';
import type { PackedAnswer, SessionAnswer } from './protocol.ts';

/** Moves the numeric columns of an answer into one block that can be transferred rather than copied. */
export function packAnswer(answer: SessionAnswer): PackedAnswer {
  const series = answer.result.series as Record<string, (number | null | string)[]>;
  const names = Object.keys(series).filter((name) => series[name].every((value) => typeof value === 'number'));
  const rows = answer.result.series.tS.length;
  const block = new Float64Array(rows * names.length);
  names.forEach((name, column) => block.set(series[name] as number[], column * rows));
  const rest = Object.fromEntries(
    Object.entries(series).map(([name, values]) => [name, names.includes(name) ? [] : values]),
  );
  const result = { ...answer.result, series: rest as unknown as SessionSeries };
  return { answer: { ...answer, result }, names, rows, block: block.buffer };
}

/** Puts the columns back in their places. */
export function unpackAnswer({ answer, names, rows, block }: PackedAnswer): SessionAnswer {
  const numbers = new Float64Array(block);
  const columns = names.map((name, column) => [name, Array.from(numbers.subarray(column * rows, (column + 1) * rows))]);
  const series = { ...answer.result.series, ...Object.fromEntries(columns) } as SessionSeries;
  return { ...answer, result: { ...answer.result, series } };
}
