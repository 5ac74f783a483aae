import { simulateSession, type SessionStudy } from '../src/index.ts';

/** What one study costs, at default accuracy with its full 10 s series, metrics and ledgers. */
export type Measured = { msPerRun: number; evaluations: number; microsPerEvaluation: number };

const clock = (): number => performance.now();

/** Lets the compiler see enough runs to settle. */
export function warmUp(study: SessionStudy, runs = 150): void {
  for (let i = 0; i < runs; i++) simulateSession(study);
}

/** Times single runs [ms]. */
export function timeRuns(study: SessionStudy, runs: number): number[] {
  return Array.from({ length: runs }, () => {
    const began = clock();
    simulateSession(study);
    return clock() - began;
  });
}

/** Time inside the derivative over its evaluations [µs], the cost of reading the clock taken off; and the evaluations of a run. */
export function timeDerivative(
  study: SessionStudy,
  runs: number,
): { evaluations: number; microsPerEvaluation: number } {
  let evaluations = 0;
  const perRun = Array.from({ length: runs }, () => {
    let insideMs = 0;
    evaluations = simulateSession(study, {
      around: (derivative) => (t, y, dy) => {
        const began = clock();
        derivative(t, y, dy);
        insideMs += clock() - began;
      },
    }).statistics.evaluations;
    return insideMs / evaluations;
  });
  return { evaluations, microsPerEvaluation: 1000 * (median(perRun) - clockCostMs()) };
}

/** What reading the clock twice adds to the time between [ms]. */
function clockCostMs(): number {
  const rounds = Array.from({ length: 20 }, () => {
    let insideMs = 0;
    for (let i = 0; i < 2000; i++) {
      const began = clock();
      insideMs += clock() - began;
    }
    return insideMs / 2000;
  });
  return median(rounds);
}

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}
