import { assemble } from "./assemble.js";
import { OutOfRangeError } from "../fluids/errors.js";
import type { CycleDefinition } from "./definition.js";
import { NoSteadyState } from "./failure.js";
import { liquefactionMargin, liquefactionThreshold, type Trial } from "./liquefaction.js";
import { buildNetwork } from "./network.js";
import type { Liquefaction, SteadyState } from "./result.js";
import { settle } from "./settle.js";

/** What a solution is to include. */
export interface SolveOptions {
  /** Look for the efficiency at which it begins to liquefy, which takes a dozen solutions more. On unless false. */
  readonly threshold?: boolean;
  /** The expander that the threshold is about; left out, every expander at once. */
  readonly thresholdOf?: string;
  /** Look whether a colder steady state exists besides. On unless false. */
  readonly lookColder?: boolean;
  /** Find what liquid and vapour of wet air are made of, some 0.1 ms a wet station. On unless false. */
  readonly composition?: boolean;
  /**
   * A machine like this one, solved before: where every stream of it is as warm as here or warmer, the search sets out from it
   * and saves the cooling down. Where not, it is passed over, so that the warmest steady state is found all the same.
   */
  readonly neighbour?: SteadyState;
}

/** Where each machine settled, to start its neighbours from. */
const settledTears = new WeakMap<SteadyState, Float64Array>();

/**
 * The steady state of a machine: of several, the warmest, which a machine cooling down from the surroundings reaches first.
 *
 * @throws NoSteadyState with the block, the quantity and what to change, where there is none
 */
export function solve(definition: CycleDefinition, options: SolveOptions = {}): SteadyState {
  try {
    return solved(definition, options);
  } catch (error) {
    if (!(error instanceof OutOfRangeError)) throw error;
    throw new NoSteadyState(null, error.quantity, `a state leaves the range of the equation: ${error.message}.`, "Look for a value in the file that is far from any real machine's.");
  }
}

function solved(definition: CycleDefinition, options: SolveOptions): SteadyState {
  const network = buildNetwork(definition);
  const from = options.neighbour === undefined ? undefined : settledTears.get(options.neighbour);
  const settled = settle(network, { lookColder: options.lookColder !== false, from });
  const assembled = assemble(network, settled, options.composition !== false);
  const margin = liquefactionMargin(network);
  const liquefaction: Liquefaction =
    options.threshold === false
      ? { reached: margin !== null && margin.margin < 0, margin: margin?.margin ?? null, where: margin?.where ?? null, parameter: "", required: null, reason: "not asked for", given: null }
      : liquefactionThreshold(definition, margin, settled.tears, trial, options.thresholdOf);
  const result = { ...assembled, liquefaction };
  settledTears.set(result, settled.tears);
  return result;
}

function trial(definition: CycleDefinition, from: Float64Array | undefined): Trial {
  const network = buildNetwork(definition);
  const { tears } = settle(network, { lookColder: false, from });
  return { margin: liquefactionMargin(network)?.margin ?? Infinity, tears };
}
