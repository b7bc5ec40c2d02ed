import { assessed } from "../cautions/registry.js";
import type { CycleDefinition } from "../cycle/definition.js";
import type { CycleResult } from "../cycle/result.js";
import { solve, type SolveOptions } from "../cycle/solve.js";
import type { Override } from "../cyclefile/define.js";
import { loadCycleFile } from "../cyclefile/load.js";

/** A machine as its file defines it, and what it does. */
export interface SolvedFile {
  readonly definition: CycleDefinition;
  readonly result: CycleResult;
}

/**
 * Reads, checks and solves a cycle file.
 * @throws InputError, NoSteadyState
 */
export async function solveFile(path: string, overrides: readonly Override[], options?: SolveOptions): Promise<SolvedFile> {
  const cycleFile = await loadCycleFile(path, overrides);
  const definition = cycleFile.define(overrides);
  return { definition, result: assessed(definition, solve(definition, options)) };
}
