import { certify } from './certify.ts';
import type { Envelope } from './envelope.ts';
import { improve, keeps } from './improve.ts';
import { StartCurves } from './start-curves.ts';
import type { Curve } from './taper-space.ts';
import { tryCurve, type Effort, type Problem, type Tick, type Trial } from './trial.ts';

const CAPS = 7;
/** Places at which a part more is tried. Slopes have more ways to go wrong than ledges. */
const INSERTIONS = { ledges: 1, slope: 3 };
const ROUNDS = 24;

/** How far a search has come: a share of its whole, 0 to 1, and what it is at. */
export type Stage = { parts: number; best: Trial | null };

/**
 * Tunes one part after another: each stage begins with the best taper of one part fewer, cut in two where that helps most, and with
 * the envelope's own best. A stage that finds nothing better hands on what it was given, so more parts are never slower.
 *
 * @param known    further tapers of the space to begin with, each at the stage of its number of parts
 * @param onStage  called after every stage
 */
export function* tuneInStages(
  problem: Problem,
  envelope: Envelope,
  parts: number,
  known: readonly Curve[],
  effort: Effort,
  onStage: (stage: Stage) => void,
): Generator<Tick, Trial | null> {
  const starts = new StartCurves(problem.space, envelope);
  let best: Trial | null = null;
  for (let n = problem.space.kind === 'ledges' ? 1 : 2; n <= parts; n++) {
    const curves: Curve[] = best === null ? [] : starts.insertions(best.curve, INSERTIONS[problem.space.kind]);
    curves.push(...known.filter((curve) => curve.value.length === n));
    const ends = [yield* fromEnvelope(problem, starts, n, effort)];
    for (const curve of curves) ends.push(yield* search(problem, yield* tryCurve(problem, curve, effort), effort));
    for (const end of ends.flat().sort(byCost).slice(0, 2)) {
      const certified: Trial | null = yield* certify(problem, end, effort);
      if (certified === null || !isBetter(certified, best)) continue;
      best = certified;
      break;
    }
    onStage({ parts: n, best });
  }
  return best;
}

/** Ends that keep the bounds first, then the cheaper. */
const byCost = (a: Trial, b: Trial): number => Number(a.worst > NEARLY) - Number(b.worst > NEARLY) || a.cost - b.cost;
/** An end this little over its bounds, in scales, is certified without loss. */
const NEARLY = 0.01;

/** Never slower by the goal alone, and better with the rest of the session. */
export function isBetter(one: Trial, than: Trial | null): boolean {
  if (than === null) return Number.isFinite(one.goal);
  return one.goal <= than.goal && one.cost < than.cost;
}

/** The envelope's best taper at the level of cut-off that runs best, improved. */
function* fromEnvelope(problem: Problem, starts: StartCurves, n: number, effort: Effort): Generator<Tick, Trial[]> {
  const trials: Trial[] = [];
  for (const cap of starts.caps(CAPS)) {
    const curve = starts.best(n, cap);
    if (curve !== null) trials.push(yield* tryCurve(problem, curve, effort));
  }
  if (trials.length === 0) return [];
  const price = 0.1 * Math.min(...trials.map((trial) => Math.abs(trial.cost)));
  const merit = (trial: Trial) => trial.cost + price * Math.max(0, trial.worst);
  const start = trials.reduce((best, trial) => (merit(trial) < merit(best) ? trial : best));
  return Number.isFinite(start.cost) ? yield* search(problem, start, effort) : [];
}

/** Improves a start; the end of the search, and the best that kept every bound where that is another. */
function* search(problem: Problem, start: Trial, effort: Effort): Generator<Tick, Trial[]> {
  if (!Number.isFinite(start.cost)) return [];
  const { best, last } = yield* improve(problem, start, effort, { rounds: ROUNDS, radius: 0.2 });
  return best === null || best === last || (keeps(last) && last.cost < best.cost) ? [last] : [last, best];
}
