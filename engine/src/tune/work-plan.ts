import type { Stage } from './stages.ts';
import type { Effort, Problem, Tick } from './trial.ts';

export type TuneProgress = {
  /** Share done, 0 to 1; it never falls. An estimate, since searches end when they are done. */
  share: number;
  /** Runs of a session so far. */
  runs: number;
  /** What it is at. */
  phase: 'tuning' | 'proof' | 'trade-off';
  /** Parts of the best taper's stage, and its goal so far (minutes or kWh); null before the first. */
  parts: number;
  best: number | null;
};

/** Usual runs per condition: of a stage by its parts, of a point of the trade-off curve by the taper's, of everything else. */
const stageRuns = (parts: number) => 60 + 35 * parts;
const pointRuns = (parts: number) => 20 + 14 * parts;
const OTHER_RUNS = 12;

/** Tells how far a tuning has come, by the runs that its phases usually take. */
export class WorkPlan {
  private phase: TuneProgress['phase'] = 'tuning';
  private parts = 0;
  private best: number | null = null;
  private share = 0;
  /** Planned runs of the stages that are over; runs made when the present one began. */
  private passed = 0;
  private began = 0;
  private next: number;
  private readonly total: number;
  private readonly conditions: number;

  constructor(
    private readonly problem: Problem,
    private readonly most: number,
    private readonly points: number,
    private readonly effort: Effort,
  ) {
    this.conditions = problem.circumstances.length;
    const stages = Array.from({ length: most }, (_, i) => stageRuns(i + 1)).reduce((sum, runs) => sum + runs, 0);
    this.total = OTHER_RUNS + stages + this.proofRuns + this.tradeOffRuns;
    this.next = OTHER_RUNS + stageRuns(1);
  }

  private get proofRuns(): number {
    return this.most + OTHER_RUNS;
  }

  private get tradeOffRuns(): number {
    return Math.max(0, this.points - 1) * pointRuns(this.most);
  }

  /** Passes a search on, a progress for each of its runs. */
  *during<T>(work: Generator<Tick, T>): Generator<TuneProgress, T> {
    for (;;) {
      const next = work.next();
      if (next.done) return next.value;
      yield this.progress();
    }
  }

  passStage({ parts, best }: Stage): void {
    this.parts = parts;
    if (best !== null) this.best = this.problem.goal.kind === 'least-minutes' ? best.goal : -best.goal;
    this.pass(parts < this.most ? stageRuns(parts + 1) : this.proofRuns);
    if (parts === this.most) this.phase = 'proof';
  }

  passProof(): void {
    this.phase = 'trade-off';
    this.pass(this.tradeOffRuns);
  }

  private pass(next: number): void {
    this.passed += this.next;
    this.next = next;
    this.began = this.effort.runs;
  }

  private progress(): TuneProgress {
    // A stage that takes longer than usual comes ever nearer to its end.
    const made = (this.effort.runs - this.began) / this.conditions / Math.max(1, this.next);
    const within = made < 0.8 ? made : 1 - 0.2 * Math.exp(-(made - 0.8) / 0.2);
    const share = (this.passed + this.next * within) / this.total;
    this.share = Math.max(this.share, Math.min(1, share));
    return { share: this.share, runs: this.effort.runs, phase: this.phase, parts: this.parts, best: this.best };
  }
}
