import { assessed } from "./cautions/registry.js";
import type { CycleDefinition } from "./cycle/definition.js";
import type { CycleResult } from "./cycle/result.js";
import { solve as solveCycle, type SolveOptions } from "./cycle/solve.js";

export { fluid } from "./fluids/registry.js";
export { readCycle } from "./cyclefile/read.js";
export { InputError } from "./cyclefile/errors.js";
export { NoSteadyState } from "./cycle/failure.js";
export { OutOfRangeError } from "./fluids/errors.js";
export type { CycleDefinition } from "./cycle/definition.js";
export type { CycleResult } from "./cycle/result.js";
export type { SolveOptions } from "./cycle/solve.js";

/**
 * The steady state of a cycle, SI units, with where moisture and carbon dioxide go and the hazards computed from it.
 *
 * @throws NoSteadyState with the block, the quantity and what to change, where the machine has none
 *
 * @example
 * const result = solve(readCycle(text));
 * result.coldEnd.temperature; // K
 */
export function solve(definition: CycleDefinition, options?: SolveOptions): CycleResult {
  return assessed(definition, solveCycle(definition, options));
}
