import { OutOfRangeError } from "../fluids/errors.js";
import { solveLinear } from "./linear.js";
import type { Pass } from "./pass.js";
import { guarded, outOfRange, unsettled } from "./reasons.js";

/** What steers the search; all in J/kg. */
export interface CoolOptions {
  /** A change of this size or less has settled. */
  readonly settled: number;
  /** The most that an unknown may move in one step. */
  readonly longestStep: number;
}

/** Passes after which a machine counts as not settling. */
const MOST_PASSES = 400;
/** Steps without the change having halved after which the slopes are measured anew. */
const PATIENCE = 4;
/** After so many of those in a row the machine is let run by itself for `RELAXING` passes, which settle what is not smooth. */
const MOST_RENEWALS = 3;
const RELAXING = 15;
/** A step is halved at most so often: where it leads into states that cannot be evaluated, */
const MOST_HALVINGS = 24;
/** and where the change grows in it by more than this factor, though it was not cut short by `longestStep`. */
const WORSE = 1.5;
const MOST_RETREATS = 4;
/** Share of the longest step by which a slope is measured: a hundredth of a kelvin, downwards, the side on which the machine goes on. */
const NUDGE = -2.5e-4;

/**
 * Several unknowns: implicit steps (theta I + I - B) d = change, B the slope of the pass by Broyden's updates of a difference
 * quotient (C. G. Broyden, Math. Comp. 19 (1965) 577); theta, an inverse time step, is raised until no unknown moves too far.
 *
 * @param start the unknowns at which the pass has left `firstChange`
 * @returns the unknowns that a pass returns unchanged
 * @throws NoSteadyState
 */
export function coolTogether(pass: Pass, start: Float64Array, firstChange: Float64Array, { settled, longestStep }: CoolOptions): Float64Array {
  const limit = pass.count + MOST_PASSES;
  let x = start;
  let change: Float64Array = Float64Array.from(firstChange);
  let slope = slopeOfPass(pass, x, change, NUDGE * longestStep);
  let best = Infinity;
  let stalled = 0;
  let renewals = 0;
  while (pass.count < limit) {
    const size = largest(change);
    if (size <= settled) return x;
    if (size > 0.5 * best) stalled++;
    else renewals = 0;
    best = Math.min(best, size);
    if (stalled > PATIENCE) {
      stalled = 0;
      if (++renewals > MOST_RENEWALS) {
        renewals = 0;
        best = Infinity;
        [x, change] = relax(pass, x, change);
      }
      slope = slopeOfPass(pass, x, change, NUDGE * longestStep);
    }
    const step = limitedStep(slope, change, longestStep);
    const [next, changeNext] = tryStep(pass, x, step, size, longestStep);
    updateSlope(slope, step, change, changeNext);
    x = next;
    change = changeNext;
  }
  throw unsettled(pass, change);
}

/** The machine's own passes, one after another. */
function relax(pass: Pass, x: Float64Array, change: Float64Array): [Float64Array, Float64Array] {
  const moved = Float64Array.from(x);
  const changed = Float64Array.from(change);
  for (let i = 0; i < RELAXING; i++) {
    for (let j = 0; j < moved.length; j++) moved[j] += changed[j];
    guarded(pass, () => pass.run(moved, changed));
  }
  return [moved, changed];
}

/** A step, halved while it cannot be evaluated or makes matters worse; `step` is left at what was done. */
function tryStep(pass: Pass, x: Float64Array, step: Float64Array, before: number, longestStep: number): [Float64Array, Float64Array] {
  const next = new Float64Array(x.length);
  const change = new Float64Array(x.length);
  const wasCut = largest(step) > 0.9 * longestStep;
  for (let halving = 0, retreats = 0; ; ) {
    for (let i = 0; i < x.length; i++) next[i] = x[i] + step[i];
    try {
      pass.run(next, change);
      if (wasCut || largest(change) <= WORSE * before || retreats++ === MOST_RETREATS) return [next, change];
    } catch (error) {
      if (!(error instanceof OutOfRangeError)) throw error;
      if (halving++ === MOST_HALVINGS) throw outOfRange(pass, error);
    }
    for (let i = 0; i < x.length; i++) step[i] /= 2;
  }
}

/** d(pass)/d(assumed), row-major, by forward differences. */
function slopeOfPass(pass: Pass, x: Float64Array, change: Float64Array, nudge: number): Float64Array {
  const size = x.length;
  const slope = new Float64Array(size * size);
  const moved = Float64Array.from(x);
  const changeMoved = new Float64Array(size);
  for (let j = 0; j < size; j++) {
    moved[j] = x[j] + nudge;
    guarded(pass, () => pass.run(moved, changeMoved));
    for (let i = 0; i < size; i++) {
      slope[i * size + j] = (changeMoved[i] - change[i]) / nudge + (i === j ? 1 : 0);
    }
    moved[j] = x[j];
  }
  return slope;
}

/** The implicit step of the smallest theta that keeps it within the limit. */
function limitedStep(slope: Float64Array, change: Float64Array, limit: number): Float64Array {
  const size = change.length;
  for (let theta = 0; ; theta = theta === 0 ? 0.05 : theta * 2) {
    const matrix = slope.map((value, index) => (index % (size + 1) === 0 ? 1 + theta : 0) - value);
    const step = solveLinear(matrix, change);
    if (step !== null && largest(step) <= limit) return step;
  }
}

/** Broyden's rank-one update, after which the slope explains the step just made. */
function updateSlope(slope: Float64Array, step: Float64Array, before: Float64Array, after: Float64Array): void {
  const size = step.length;
  const length = step.reduce((sum, value) => sum + value * value, 0);
  if (length === 0) return;
  for (let i = 0; i < size; i++) {
    let explained = -step[i];
    for (let j = 0; j < size; j++) explained += slope[i * size + j] * step[j];
    const error = after[i] - before[i] - explained;
    for (let j = 0; j < size; j++) slope[i * size + j] = slope[i * size + j] + (error * step[j]) / length;
  }
}

/** The largest magnitude. */
export function largest(values: Float64Array): number {
  let most = 0;
  for (const value of values) most = Math.max(most, Math.abs(value));
  return most;
}
