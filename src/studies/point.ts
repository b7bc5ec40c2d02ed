import { NoSteadyState } from "../cycle/failure.js";
import type { SteadyState } from "../cycle/result.js";
import { solve } from "../cycle/solve.js";
import type { Override } from "../cyclefile/define.js";
import { InputError } from "../cyclefile/errors.js";
import type { CycleFile } from "../cyclefile/open.js";
import { FluidError } from "../fluids/errors.js";
import type { Needs } from "./quantities.js";

/** One machine of a study: its steady state, or why it has none. */
export type Point =
  | { readonly status: "solved"; readonly result: SteadyState }
  /** "not allowed" where the values contradict one another, such as a pressure that would rise through an expander. */
  | { readonly status: "no steady state" | "not allowed"; readonly reason: string };

/** What a study asks of a point besides its steady state. */
export interface PointOptions {
  /** What the results asked for need. */
  readonly needs?: Needs;
  /** A point solved before, to start from where that helps. */
  readonly neighbour?: Point | undefined;
}

/** Solves a cycle file with values in place of those written; what cannot be solved is an answer too. */
export function solvePoint(file: CycleFile, overrides: readonly Override[], { needs = {}, neighbour }: PointOptions = {}): Point {
  const from = neighbour?.status === "solved" ? { neighbour: neighbour.result } : {};
  try {
    return { status: "solved", result: solve(file.define(overrides), { threshold: false, lookColder: false, composition: false, ...needs, ...from }) };
  } catch (error) {
    if (error instanceof NoSteadyState || error instanceof FluidError) return { status: "no steady state", reason: error.message };
    if (error instanceof InputError) return { status: "not allowed", reason: error.problems.map(({ found, expected }) => `${found}; expected ${expected}`).join("; ") };
    throw error;
  }
}
