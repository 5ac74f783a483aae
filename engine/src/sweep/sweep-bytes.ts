import { CELL, type CellFailure } from './run-cells.ts';
import type { SweepPlan } from './sweep-plan.ts';
import { SweepResult } from './sweep-result.ts';

const MAGIC = 'VPSWEEP1';
const CHECK_AT = 8;
const LENGTH_AT = 12;
const HEAD_BYTES = 16;
const NUMBER_BYTES = 8;

export type SweepDataCode = 'NOT_SWEEP_DATA' | 'OTHER_ENGINE' | 'OTHER_REQUEST' | 'DAMAGED';

/** Kept results of a sweep that cannot be used; the message says why. */
export class SweepDataError extends Error {
  override readonly name = 'SweepDataError';
  readonly code: SweepDataCode;
  constructor(code: SweepDataCode, message: string) {
    super(message);
    this.code = code;
  }
}

type Header = {
  engine: string;
  hash: string;
  cells: number;
  columns: string[];
  /** Reasons of the failed cells, each once, and for each failed cell, by rising index, which one it is. */
  reasons: CellFailure[];
  failed: number[];
};

/**
 * Results as bytes, to be stored and carried on: the magic word, a check of all that
 * follows (uint32, FNV-1a), the length of a header (uint32), the header (ASCII JSON, padded with spaces), one byte of status per cell padded to eight, then column by column the numbers (float64) of the
 * finished cells by rising index. Little-endian. The same results give the same bytes, in whatever order they came.
 *
 * @param engine  version of the engine that made them
 */
export function encodeSweep(result: SweepResult, engine: string): Uint8Array<ArrayBuffer> {
  const { plan, status } = result;
  const done = cellsOf(status, CELL.done);
  const header = asciiJson(headerOf(result, engine));
  const statusAt = HEAD_BYTES + header.length;
  const valuesAt = statusAt + padded(plan.size);
  const bytes = new Uint8Array(valuesAt + plan.columns.length * done.length * NUMBER_BYTES);
  const view = new DataView(bytes.buffer);
  writeAscii(bytes, 0, MAGIC);
  view.setUint32(LENGTH_AT, header.length, true);
  writeAscii(bytes, HEAD_BYTES, header);
  bytes.set(status, statusAt);
  let at = valuesAt;
  for (const id of plan.columns) {
    const column = result.column(id);
    for (const index of done) {
      view.setFloat64(at, column[index], true);
      at += NUMBER_BYTES;
    }
  }
  view.setUint32(CHECK_AT, checkOf(bytes), true);
  return bytes;
}

/**
 * The results that `encodeSweep` wrote.
 *
 * @param plan    what is to be carried on
 * @param engine  version of the engine at hand
 * @throws {SweepDataError} where the bytes are no such results, are damaged, or belong to another request or version
 */
export function decodeSweep(bytes: Uint8Array, plan: SweepPlan, engine: string): SweepResult {
  const { header, statusAt } = readHeader(bytes);
  if (header.engine !== engine) {
    const message = `These results were made by engine ${header.engine}, but this is ${engine}: run the sweep again.`;
    throw new SweepDataError('OTHER_ENGINE', message);
  }
  if (header.hash !== plan.hash || header.columns.join() !== plan.columns.join()) {
    const message = 'These results belong to another sweep: its base study or what is varied has changed since.';
    throw new SweepDataError('OTHER_REQUEST', message);
  }
  const status = bytes.slice(statusAt, statusAt + plan.size);
  const done = cellsOf(status, CELL.done);
  const failed = cellsOf(status, CELL.failed);
  const valuesAt = statusAt + padded(plan.size);
  const result = new SweepResult(plan);
  const failures = failed.map((index, i) => ({ index, failure: header.reasons[header.failed[i]] }));
  const nothing = new Float64Array(plan.columns.length * failed.length).fill(NaN);
  result.merge(chunkOf(done, CELL.done, numbersOf(bytes, valuesAt, plan.columns.length * done.length), []));
  result.merge(chunkOf(failed, CELL.failed, nothing, failures));
  return result;
}

function chunkOf(
  cells: number[],
  status: number,
  values: Float64Array,
  failures: { index: number; failure: CellFailure }[],
) {
  const indices = Uint32Array.from(cells);
  return { indices, status: new Uint8Array(cells.length).fill(status), values, failures };
}

function numbersOf(bytes: Uint8Array, at: number, count: number): Float64Array {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  return Float64Array.from({ length: count }, (_, i) => view.getFloat64(at + i * NUMBER_BYTES, true));
}

function readHeader(bytes: Uint8Array): { header: Header; statusAt: number } {
  if (bytes.length < HEAD_BYTES || readAscii(bytes, 0, MAGIC.length) !== MAGIC)
    throw new SweepDataError(
      'NOT_SWEEP_DATA',
      'These are not the results of a sweep, or not of this version of the format.',
    );
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (view.getUint32(CHECK_AT, true) !== checkOf(bytes))
    throw new SweepDataError('DAMAGED', 'The kept results of this sweep are damaged: their check does not match.');
  const length = view.getUint32(LENGTH_AT, true);
  return { header: JSON.parse(readAscii(bytes, HEAD_BYTES, length)) as Header, statusAt: HEAD_BYTES + length };
}

/** FNV-1a, 32 bits, of everything after the check itself. */
function checkOf(bytes: Uint8Array): number {
  let check = 0x811c9dc5;
  for (let i = LENGTH_AT; i < bytes.length; i++) check = Math.imul(check ^ bytes[i], 0x01000193);
  return check >>> 0;
}

function headerOf({ plan, failures, status }: SweepResult, engine: string): Header {
  const reasons: CellFailure[] = [];
  const numberOf = new Map<string, number>();
  const failed = cellsOf(status, CELL.failed).map((index) => {
    const reason = failures.get(index)!;
    const key = JSON.stringify([reason.code, reason.path, reason.message]);
    const known = numberOf.get(key) ?? reasons.push(reason) - 1;
    numberOf.set(key, known);
    return known;
  });
  return { engine, hash: plan.hash, cells: plan.size, columns: plan.columns, reasons, failed };
}

function cellsOf(status: Uint8Array, wanted: number): number[] {
  const cells: number[] = [];
  status.forEach((one, index) => one === wanted && cells.push(index));
  return cells;
}

const padded = (length: number): number => Math.ceil(length / NUMBER_BYTES) * NUMBER_BYTES;

/** JSON in ASCII, padded so that what follows stands on a multiple of eight. */
function asciiJson(value: unknown): string {
  const escaped = (char: string) => `\\u${char.charCodeAt(0).toString(16).padStart(4, '0')}`;
  // eslint-disable-next-line no-control-regex -- everything that is not ASCII
  const text = JSON.stringify(value).replace(/[^\x00-\x7f]/g, escaped);
  return text.padEnd(padded(HEAD_BYTES + text.length) - HEAD_BYTES);
}

function writeAscii(bytes: Uint8Array, at: number, text: string): void {
  for (let i = 0; i < text.length; i++) bytes[at + i] = text.charCodeAt(i);
}

function readAscii(bytes: Uint8Array, at: number, length: number): string {
  let text = '';
  for (const byte of bytes.subarray(at, at + length)) text += String.fromCharCode(byte);
  return text;
}
