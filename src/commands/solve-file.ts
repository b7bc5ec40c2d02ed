import { assessed } from "../cautions/registry.js";
import type { CycleResult } from "../cycle/result.js";
import { solve, type SolveOptions } from "../cycle/solve.js";
import type { Override } from "../cyclefile/define.js";
import { loadCycleFile } from "../cyclefile/load.js";

/**
 * Reads, checks and solves a cycle file.
 * @throws InputError, NoSteadyState
 */
export async function solveFile(path: string, overrides: readonly Override[], options?: SolveOptions): Promise<CycleResult> {
  const cycleFile = await loadCycleFile(path, overrides);
  const definition = cycleFile.define(overrides);
  return assessed(definition, solve(definition, options));
}
