import type { Override } from "../cyclefile/define.js";
import { InputError } from "../cyclefile/errors.js";
import type { CycleFile } from "../cyclefile/open.js";
import { solvePoint, type Point } from "./point.js";
import { needsOf, type ResultQuantity } from "./quantities.js";
import type { Variable } from "./variation.js";

/** Points beyond which a sweep is refused: some minutes of computing. */
export const MOST_POINTS = 100_000;

/** One variable and the numbers that it takes, in its unit. */
export interface Swept {
  readonly variable: Variable;
  readonly values: readonly number[];
}

/** One machine of a sweep. */
export interface SweepRow {
  /** Of each variable, in its unit. */
  readonly values: readonly number[];
  readonly status: Point["status"];
  /** Why there is no result; null where there is one. */
  readonly reason: string | null;
  /** Whether liquid forms somewhere. */
  readonly wet: boolean;
  /** Of each quantity shown, SI; null where the machine has no such number or no steady state. */
  readonly results: readonly (number | null)[];
}

/**
 * Solves the machine for every combination of values, the last variable's fastest, one row at a time so that each can be kept as
 * soon as it is there. A machine without a steady state is a row that says so.
 *
 * @throws InputError when asked for more than `MOST_POINTS`, before anything is solved
 */
export function sweep(file: CycleFile, swept: readonly Swept[], shown: readonly ResultQuantity[], overrides: readonly Override[] = []): Iterable<SweepRow> {
  const points = swept.reduce((product, { values }) => product * values.length, 1);
  if (points > MOST_POINTS) {
    const place = `--vary ${swept.map(({ variable }) => variable.address).join(", ")}`;
    throw new InputError([{ code: "too-many-points", place, line: 0, column: 0, found: `${points} points`, expected: `at most ${MOST_POINTS}; fewer --steps` }]);
  }
  return rows(file, swept, shown, overrides);
}

function* rows(file: CycleFile, swept: readonly Swept[], shown: readonly ResultQuantity[], overrides: readonly Override[]): Generator<SweepRow> {
  const needs = needsOf(shown);
  let before: Point | undefined;
  for (const values of combinations(swept.map((each) => each.values))) {
    const point = solvePoint(file, [...overrides, ...values.map((value, i) => swept[i].variable.override(value))], { needs, neighbour: before });
    before = point;
    yield point.status === "solved"
      ? { values, status: point.status, reason: null, wet: point.result.liquefaction.reached, results: shown.map(({ get }) => get(point.result)) }
      : { values, status: point.status, reason: point.reason, wet: false, results: shown.map(() => null) };
  }
}

function* combinations(lists: readonly (readonly number[])[]): Generator<number[]> {
  const [first, ...rest] = lists;
  if (first === undefined) {
    yield [];
    return;
  }
  for (const value of first) for (const others of combinations(rest)) yield [value, ...others];
}
