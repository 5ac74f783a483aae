/** A row on both sides, or on one of them; the numbers count from 0. */
export type RowPair = { before: number | null; after: number | null };

type Key = (row: readonly unknown[]) => string;

/** What makes rows the same row: first all of it, then where it begins, so that an inserted row moves nothing else. */
const KEYS: readonly Key[] = [(row) => JSON.stringify(row), (row) => JSON.stringify(row[0] ?? null)];

/**
 * Which row of one table became which row of another. Equal rows are held together first, then rows with the same first
 * cell; what lies between is paired in order, and what is over on one side was added or deleted.
 */
export function alignedRows(before: readonly unknown[][], after: readonly unknown[][]): RowPair[] {
  return aligned(before, after, { b: 0, bEnd: before.length, a: 0, aEnd: after.length }, KEYS);
}

type Span = { b: number; bEnd: number; a: number; aEnd: number };

function aligned(
  before: readonly unknown[][],
  after: readonly unknown[][],
  span: Span,
  [key, ...further]: readonly Key[],
): RowPair[] {
  if (!key) return inOrder(span);
  const kept = longestCommon(before.map(key), after.map(key), span);
  const ends = [...kept, { before: span.bEnd, after: span.aEnd }];
  let { b, a } = span;
  return ends.flatMap((end, i) => {
    const between = aligned(before, after, { b, bEnd: end.before, a, aEnd: end.after }, further);
    b = end.before + 1;
    a = end.after + 1;
    return i < kept.length ? [...between, end] : between;
  });
}

function inOrder({ b, bEnd, a, aEnd }: Span): RowPair[] {
  return Array.from({ length: Math.max(bEnd - b, aEnd - a) }, (_, i) => ({
    before: b + i < bEnd ? b + i : null,
    after: a + i < aEnd ? a + i : null,
  }));
}

/** The longest run of rows, not necessarily adjacent, that stand on both sides in the same order. */
function longestCommon(before: string[], after: string[], { b, bEnd, a, aEnd }: Span) {
  // length[i][j]: how many rows the tails from b + i and a + j have in common
  const rows = bEnd - b;
  const columns = aEnd - a;
  const length = Array.from({ length: rows + 1 }, () => new Array<number>(columns + 1).fill(0));
  for (let i = rows - 1; i >= 0; i--)
    for (let j = columns - 1; j >= 0; j--)
      length[i]![j] =
        before[b + i] === after[a + j] ? length[i + 1]![j + 1]! + 1 : Math.max(length[i + 1]![j]!, length[i]![j + 1]!);
  const found: { before: number; after: number }[] = [];
  for (let i = 0, j = 0; i < rows && j < columns;) {
    if (before[b + i] === after[a + j]) found.push({ before: b + i++, after: a + j++ });
    else if (length[i + 1]![j]! >= length[i]![j + 1]!) i++;
    else j++;
  }
  return found;
}
