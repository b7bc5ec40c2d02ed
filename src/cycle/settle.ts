import { bracketedRoot } from "../fluids/root.js";
import { OutOfRangeError } from "../fluids/errors.js";
import { State } from "../fluids/state.js";
import { solveLinear } from "./linear.js";
import type { Network } from "./network.js";
import { Pass } from "./pass.js";
import { outOfRange, tooWarm, unsettled } from "./reasons.js";

/** How the steady state was reached. */
export interface Settled {
  readonly iterations: number;
  /** True where a colder steady state exists besides the one reached. */
  readonly otherSteadyStates: boolean;
  /** J/kg, the tears' enthalpies. */
  readonly tears: Float64Array;
}

/** How to settle. */
export interface SettleOptions {
  /** Whether to look for a colder steady state besides. */
  readonly lookColder: boolean;
  /**
   * The tears of a machine that is like this one but cools less in every state, a poorer expander's: set out from there instead of
   * the surroundings' temperature. Taken only if a pass lowers it, as it then must.
   */
  readonly from?: Float64Array | undefined;
}

/** J/kg per J/(kg K) of heat capacity, that is K: an assumed enthalpy that comes back within this has settled. */
const SETTLED = 1e-9;
/** K of ideal gas; the most that a tear may cool in one step, so that a steady state on the way is not stepped over. */
const LONGEST_STEP = 40;
/** Passes after which a machine counts as not settling. */
const MOST_PASSES = 600;
/** How much more than `SETTLED` the last pass may change: its round-off against that of the pass before. */
const SETTLED_AGAIN = 10;
const MOST_ATTEMPTS = 5;
/** Share of the way back to the start from which a further attempt sets out: above its end, but not far. */
const NOT_ALL_THE_WAY = 0.05;
/** A step into states that cannot be evaluated is halved so often before the machine counts as having run out of range. */
const MOST_HALVINGS = 24;
/** Places between the steady state and the coldest liquid at which a colder one is looked for. */
const COLDER = [0.05, 0.2, 0.45, 0.8];

/**
 * Lets the machine cool down from the surroundings' temperature until a pass changes nothing.
 *
 * Colder gas into any block gives colder gas out of it, so a pass is a monotone map of the assumed enthalpies; from a
 * point that it lowers everywhere, lowering leads to its highest fixed point, the warmest steady state. The steps are
 * quasi-Newton ones, never longer than `LONGEST_STEP`; with one tear the last ones run inside a bracket.
 *
 * @throws NoSteadyState with the reason
 */
export function settle(network: Network, { lookColder, from: nearer }: SettleOptions): Settled {
  const pass = new Pass(network);
  const size = network.tears.length;
  const start = warmStart(network);
  const change = new Float64Array(size);
  if (size === 0) {
    guarded(pass, () => pass.run(start, change));
    return { iterations: 1, otherSteadyStates: false, tears: start };
  }
  const capacity = heatCapacity(network);
  let from = nearer !== undefined && isUpper(pass, nearer, change, capacity) ? nearer : start;
  if (from === start) guarded(pass, () => pass.run(start, change));
  // With several tears one may warm at first all the same: a leak into a stream that nothing cools yet.
  if (change.every((value) => value > SETTLED * capacity)) throw tooWarm(network, change);
  for (let attempt = 1; ; attempt++) {
    const x = size === 1 ? coolOneTear(pass, from, change, capacity) : coolTears(pass, from, change, capacity);
    const otherSteadyStates = lookColder && hasColder(network, pass, x, capacity);
    guarded(pass, () => pass.run(x, change));
    if (largest(change) <= SETTLED_AGAIN * SETTLED * capacity) {
      if (x.every((value, i) => value > start[i])) throw tooWarm(network, x.map((value, i) => value - start[i]));
      return { iterations: pass.count, otherSteadyStates, tears: x };
    }
    // An exchanger has found on the way that it must be summed in finer pieces, and keeps to that from now on.
    if (attempt === MOST_ATTEMPTS) throw unsettled(pass, largest(change) / capacity);
    from = x.map((value, i) => value + NOT_ALL_THE_WAY * (start[i] - value));
    guarded(pass, () => pass.run(from, change));
    if (change.some((value) => value > 0)) {
      from = start;
      guarded(pass, () => pass.run(from, change));
    }
  }
}

/** Whether a pass lowers a point everywhere, so that the warmest steady state lies below it; leaves the change. */
function isUpper(pass: Pass, x: Float64Array, change: Float64Array, capacity: number): boolean {
  try {
    pass.run(x, change);
  } catch (error) {
    if (error instanceof OutOfRangeError) return false;
    throw error;
  }
  return change.every((value) => value <= SETTLED * capacity);
}

/** Every tear at the surroundings' temperature, or at that of the hottest outlet that a block fixes. */
function warmStart({ tears, setting, order }: Network): Float64Array {
  const scratch = new State();
  let hottest = setting.surroundings.temperature;
  for (const { unit, kind, ports } of order) {
    for (const { entry, outlet } of ports) {
      if (kind.fixesOutlet?.(entry) !== true) continue;
      unit.evaluate();
      hottest = Math.max(hottest, setting.fluid.pressureEnthalpy(outlet.pressure, outlet.enthalpy, scratch).temperature);
    }
  }
  return Float64Array.from(tears, ({ pressure }) => setting.fluid.temperaturePressure(hottest, pressure, scratch).enthalpy);
}

/** J/(kg K) of the gas around the machine: turns temperature steps into enthalpy steps of any fluid. */
function heatCapacity({ setting }: Network): number {
  const { temperature, pressure } = setting.surroundings;
  return setting.fluid.temperaturePressure(temperature, pressure, new State()).isobaricHeatCapacity;
}

/** One tear: the change is a function of one number, followed down to its first change of sign. */
function coolOneTear(pass: Pass, start: Float64Array, change: Float64Array, capacity: number): Float64Array {
  const x = Float64Array.from(start);
  const changeAt = (enthalpy: number): number => {
    x[0] = enthalpy;
    pass.run(x, change);
    return change[0] as number;
  };
  const settled = SETTLED * capacity;
  let here = start[0] as number;
  let changeHere = change[0] as number;
  let slope = -1;
  while (pass.count < MOST_PASSES) {
    if (Math.abs(changeHere) <= settled) break;
    // Beyond a point where the change no longer shrinks on cooling, Newton has no say: the machine cools on.
    const newton = slope < 0 ? changeHere / slope : Infinity;
    const [next, changeNext] = stepDown(pass, changeAt, here, Math.min(newton, LONGEST_STEP * capacity));
    if (changeNext > settled) {
      guarded(pass, () => {
        here = bracketedRoot(changeAt, here, next, { tolerance: settled }, changeHere, changeNext);
        changeHere = changeAt(here);
      });
      break;
    }
    slope = (changeNext - changeHere) / (next - here);
    here = next;
    changeHere = changeNext;
  }
  // The bracket closes on a jump of the change as well as on a root of it; a jump is no steady state.
  if (Math.abs(changeHere) > 1e3 * settled) throw unsettled(pass, Math.abs(changeHere) / capacity);
  x[0] = here;
  return x;
}

/** A step down that can be evaluated, halved until it is. */
function stepDown(pass: Pass, changeAt: (enthalpy: number) => number, from: number, step: number): [number, number] {
  for (let halving = 0; ; halving++) {
    try {
      return [from - step, changeAt(from - step)];
    } catch (error) {
      if (!(error instanceof OutOfRangeError)) throw error;
      if (halving === MOST_HALVINGS) throw outOfRange(pass, error);
      step /= 2;
    }
  }
}

/**
 * Several tears: implicit steps (theta I + I - B) d = change, B the slope of the pass by Broyden's updates of a difference
 * quotient; theta, an inverse time step, is raised until no tear moves too far.
 */
function coolTears(pass: Pass, start: Float64Array, firstChange: Float64Array, capacity: number): Float64Array {
  const size = start.length;
  let x = start;
  let change = Float64Array.from(firstChange);
  let slope = slopeOfPass(pass, x, change, capacity);
  let best = Infinity;
  let stalled = 0;
  while (pass.count < MOST_PASSES) {
    const size2 = largest(change);
    if (size2 <= SETTLED * capacity) return x;
    if (size2 > 0.5 * best) stalled++;
    best = Math.min(best, size2);
    if (stalled > 4) {
      slope = slopeOfPass(pass, x, change, capacity);
      stalled = 0;
    }
    let step = limitedStep(slope, change, LONGEST_STEP * capacity);
    const next = new Float64Array(size);
    const changeNext = new Float64Array(size);
    for (let halving = 0; ; halving++) {
      for (let i = 0; i < size; i++) next[i] = (x[i] as number) + (step[i] as number);
      try {
        pass.run(next, changeNext);
        break;
      } catch (error) {
        if (!(error instanceof OutOfRangeError)) throw error;
        if (halving === MOST_HALVINGS) throw outOfRange(pass, error);
        step = step.map((value) => value / 2);
      }
    }
    updateSlope(slope, step, change, changeNext);
    x = next;
    change = changeNext;
  }
  throw unsettled(pass, best / capacity);
}

/** d(pass)/d(assumed), row-major, by forward differences. */
function slopeOfPass(pass: Pass, x: Float64Array, change: Float64Array, capacity: number): Float64Array {
  const size = x.length;
  const slope = new Float64Array(size * size);
  const moved = Float64Array.from(x);
  const changeMoved = new Float64Array(size);
  // A hundredth of a kelvin, downwards: the side on which the machine will go on.
  const nudge = -0.01 * capacity;
  for (let j = 0; j < size; j++) {
    moved[j] = (x[j] as number) + nudge;
    guarded(pass, () => pass.run(moved, changeMoved));
    for (let i = 0; i < size; i++) {
      slope[i * size + j] = ((changeMoved[i] as number) - (change[i] as number)) / nudge + (i === j ? 1 : 0);
    }
    moved[j] = x[j] as number;
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
    let explained = -(step[i] as number);
    for (let j = 0; j < size; j++) explained += (slope[i * size + j] as number) * (step[j] as number);
    const error = (after[i] as number) - (before[i] as number) - explained;
    for (let j = 0; j < size; j++) slope[i * size + j] = (slope[i * size + j] as number) + (error * (step[j] as number)) / length;
  }
}

/**
 * Whether a colder steady state exists: below a point that a pass lowers everywhere there is one, unless it falls out of
 * the equation's range.
 */
function hasColder({ tears, setting }: Network, pass: Pass, x: Float64Array, capacity: number): boolean {
  const { fluid } = setting;
  const scratch = new State();
  const coldest = Float64Array.from(tears, ({ pressure }) => fluid.temperaturePressure(fluid.minimumTemperature * 1.0001, pressure, scratch).enthalpy);
  const trial = new Float64Array(x.length);
  const change = new Float64Array(x.length);
  for (const share of COLDER) {
    for (let i = 0; i < x.length; i++) trial[i] = (x[i] as number) + share * ((coldest[i] as number) - (x[i] as number));
    try {
      pass.run(trial, change);
    } catch (error) {
      if (error instanceof OutOfRangeError) return false;
      throw error;
    }
    if (change.every((value) => value < -SETTLED * capacity)) return true;
  }
  return false;
}

function largest(values: Float64Array): number {
  let most = 0;
  for (const value of values) most = Math.max(most, Math.abs(value));
  return most;
}

/** Runs a pass that has to succeed, turning a state outside the equation into the answer that there is no steady state. */
function guarded(pass: Pass, run: () => void): void {
  try {
    run();
  } catch (error) {
    if (error instanceof OutOfRangeError) throw outOfRange(pass, error);
    throw error;
  }
}
