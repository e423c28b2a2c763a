/** What of the package odex is used; `#odex` in package.json gives this for types and the package for running. */

/** x, the state and the slopes: y′ = f(x, y). */
export type Derivative = (x: number, y: readonly number[]) => number[];
/** Called after each accepted step; `dense` interpolates a component inside it. False ends the integration. */
export type StepObserver = (
  step: number,
  xBefore: number,
  x: number,
  y: readonly number[],
  dense: (component: number, x: number) => number,
) => false | undefined;

export declare enum Outcome {
  Converged = 0,
  MaxStepsExceeded = 1,
  EarlyReturn = 2,
}

export declare class Solver {
  constructor(components: number);
  denseOutput: boolean;
  absoluteTolerance: number | number[];
  relativeTolerance: number | number[];
  initialStepSize: number;
  maxSteps: number;
  solve(
    f: Derivative,
    x0: number,
    y0: readonly number[],
    xEnd: number,
    observer?: StepObserver,
  ): { readonly y: number[]; readonly outcome: Outcome };
}
