import { Solver, type DenseFunction } from 'odex';
import { studyError } from '../study/study-error.ts';

/** One accepted step: the states at its end, and inside it through `dense(component, t)`. */
export type Step = { t0: number; t1: number; y: number[]; dense: DenseFunction };

export type StepperOptions = {
  relativeTolerance: number;
  /** Absolute tolerance of each component, in its own unit. */
  absoluteTolerance: number[];
  /** Longest and first step [s]. */
  maxStepS: number;
  firstStepS: number;
  /** Most evaluations of the derivative over the whole run. */
  maxEvaluations: number;
  /** Says what makes the system stiff, for the message when the budget is spent. */
  diagnose: () => string;
};

const MOST_SHORTENED = 8;

export type Derivative = (t: number, y: number[], dy: number[]) => void;

/**
 * The one door to odex (extrapolation of the explicit midpoint rule, Hairer, Nørsett & Wanner 1993, II.9).
 * Every call of `from` starts again at a point; evaluations are counted here, since odex counts them short.
 */
export class Stepper {
  evaluations = 0;
  starts = 0;
  steps = 0;
  private solver: Solver;
  private readonly makeSolver: () => Solver;
  private maxStepS: number;
  private shortened = 0;

  constructor(derivative: Derivative, options: StepperOptions) {
    this.maxStepS = options.maxStepS;
    const size = options.absoluteTolerance.length;
    // odex looks a component's place up in this list for every reading; here each stands at its own index.
    const components = Array.from({ length: size }, (_, i) => i);
    components.indexOf = (component: number) => component;
    const counted: Derivative = (t, y, dy) => {
      if (++this.evaluations > options.maxEvaluations) throw overBudget(options, t);
      derivative(t, y, dy);
    };
    this.makeSolver = () =>
      new Solver(counted, size, {
        rawFunction: true,
        denseOutput: true,
        denseComponents: components,
        relativeTolerance: options.relativeTolerance,
        absoluteTolerance: options.absoluteTolerance,
        maxStepSize: this.maxStepS,
        initialStepSize: Math.min(options.firstStepS, this.maxStepS),
        maxExtrapolationColumns: 7,
        maxSteps: options.maxEvaluations,
      });
    this.solver = this.makeSolver();
  }

  /** Holds all further steps to a quarter, after a trial step left the numbers' range; false where that was done often enough. */
  shorten(): boolean {
    if (++this.shortened > MOST_SHORTENED) return false;
    this.maxStepS /= 4;
    this.solver = this.makeSolver();
    return true;
  }

  /** Steps from (t, y) to `end`; the caller may leave off at any of them. */
  *from(t: number, y: number[], end: number): Generator<Step, void> {
    this.starts++;
    for (const segment of this.solver.solutionSegments(t, y, end)) {
      this.steps++;
      yield { t0: segment.x0, t1: segment.x1, y: segment.y, dense: segment.f };
    }
  }
}

function overBudget(options: StepperOptions, t: number): Error {
  const message =
    `Stopped at ${(t / 60).toFixed(1)} min after ${options.maxEvaluations} evaluations without getting further: ${options.diagnose()}. ` +
    'Raise the small time constant, or loosen the tolerance.';
  return studyError('BUDGET', '', 'budget', message, options.maxEvaluations);
}
