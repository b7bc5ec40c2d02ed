import { bracketedRoot } from "../fluids/root.js";
import { OutOfRangeError } from "../fluids/errors.js";
import { State } from "../fluids/state.js";
import type { Network } from "./network.js";
import { Pass } from "./pass.js";
import { coolTogether, largest } from "./cool-together.js";
import { guarded, outOfRange, tooWarm, unsettled } from "./reasons.js";

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
/** Ratio at which a floating pressure sets out, and passes that settle the flows before anything cools. */
const FIRST_RATIO = 1.2;
const FLOW_ROUNDS = 3;
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
  const { size, enthalpies } = pass;
  const start = pass.start(warmStart(network), FIRST_RATIO);
  const change = new Float64Array(size);
  if (size === 0) {
    guarded(pass, () => pass.run(start, change));
    return { iterations: 1, otherSteadyStates: false, tears: start };
  }
  const capacity = heatCapacity(network);
  let from = nearer?.length === size && size === enthalpies && isUpper(pass, nearer, change, capacity) ? nearer : start;
  if (from === start) {
    guarded(pass, () => pass.run(start, change));
    // The flows of a machine without liquid follow from a pass or two; what is assumed of them matters little.
    const rounds = size > enthalpies ? FLOW_ROUNDS : 0;
    for (let round = 0; round < rounds; round++) {
      for (let i = enthalpies; i < size - network.floating.length; i++) start[i] += change[i];
      guarded(pass, () => pass.run(start, change));
    }
  }
  // With several tears one may warm at first all the same: a leak into a stream that nothing cools yet.
  if (enthalpies > 0 && change.subarray(0, enthalpies).every((value) => value > SETTLED * capacity)) throw tooWarm(network, change);
  for (let attempt = 1; ; attempt++) {
    const x = size === 1 ? coolOneTear(pass, from, change, capacity) : coolTogether(pass, from, change, { settled: SETTLED * capacity, longestStep: LONGEST_STEP * capacity });
    const otherSteadyStates = lookColder && hasColder(network, pass, x, capacity);
    guarded(pass, () => pass.run(x, change));
    if (largest(change) <= SETTLED_AGAIN * SETTLED * capacity) {
      if (x.subarray(0, enthalpies).every((value, i) => value > start[i]) && enthalpies > 0) throw tooWarm(network, x.map((value, i) => value - start[i]));
      return { iterations: pass.count, otherSteadyStates, tears: x };
    }
    // An exchanger has found on the way that it must be summed in finer pieces, and keeps to that from now on.
    if (attempt === MOST_ATTEMPTS) throw unsettled(pass, change);
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
  return Float64Array.from(tears, ({ stream }) => setting.fluid.temperaturePressure(hottest, stream.pressure, scratch).enthalpy);
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
    return change[0];
  };
  const settled = SETTLED * capacity;
  let here = start[0];
  let changeHere = change[0];
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
  if (Math.abs(changeHere) > 1e3 * settled) throw unsettled(pass, Float64Array.of(changeHere));
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
 * Whether a colder steady state exists: below a point that a pass lowers everywhere there is one, unless it falls out of
 * the equation's range.
 */
function hasColder({ tears, setting }: Network, pass: Pass, x: Float64Array, capacity: number): boolean {
  // With flows or pressures among the unknowns a pass is no longer monotone, and nothing would be proved.
  if (pass.size > pass.enthalpies) return false;
  const { fluid } = setting;
  const scratch = new State();
  const coldest = Float64Array.from(tears, ({ stream }) => fluid.temperaturePressure(fluid.minimumTemperature * 1.0001, stream.pressure, scratch).enthalpy);
  const trial = new Float64Array(x.length);
  const change = new Float64Array(x.length);
  for (const share of COLDER) {
    for (let i = 0; i < x.length; i++) trial[i] = (x[i]) + share * ((coldest[i]) - (x[i]));
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
