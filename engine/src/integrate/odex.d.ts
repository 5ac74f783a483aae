// odex ships no usable types; these describe the parts of 3.0.0-rc.4 that are used here.
export type DenseFunction = (component: number, x: number) => number;

export type SolutionSegment = { x0: number; x1: number; y: number[]; f: DenseFunction };

export type SolverOptions = {
  rawFunction: boolean;
  relativeTolerance: number | number[];
  absoluteTolerance: number | number[];
  maxSteps: number;
  maxStepSize: number;
  initialStepSize: number;
  maxExtrapolationColumns: number;
  denseOutput: boolean;
  denseOutputErrorEstimator: boolean;
  denseComponents: number[];
  interpolationFormulaDegree: number;
  stabilityCheckCount: number;
  stabilityCheckTableLines: number;
};

export class Solver {
  constructor(f: (x: number, y: number[], yp: number[]) => void, n: number, options?: Partial<SolverOptions>);
  solutionSegments(x: number, y0: number[], xEnd?: number): Generator<SolutionSegment, undefined>;
}
