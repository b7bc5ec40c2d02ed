import type { SteadyState } from "../cycle/result.js";
import type { Override } from "../cyclefile/define.js";
import { InputError } from "../cyclefile/errors.js";
import type { CycleFile } from "../cyclefile/open.js";
import type { Condition } from "./condition.js";
import { crossings, type Edge, type Followed, type Turn } from "./crossings.js";
import { solvePoint } from "./point.js";
import type { Variable } from "./variation.js";

/** Intervals scanned for a change of sign. */
const SCANNED = 60;
/** Share of the span by which a bound that is itself illegal is kept away from. */
const FROM_BOUND = 1e-3;
/** Share of the span at which the machine is looked at on either side of a turn. */
const ASIDE = 1e-3;
/** A key without bounds is looked at from a tenth to ten times what the file gives, a temperature 50 K up and down. */
const AROUND = 10;
const AROUND_TEMPERATURE = 50;

/** Where a condition turns as a number of the cycle file moves. Places are in the variable's unit. */
export interface BreakEven {
  readonly variable: Variable;
  readonly condition: Condition;
  /** The range looked at. */
  readonly range: readonly [number, number];
  /** Every place at which the condition turns, ascending. */
  readonly turns: readonly BreakEvenTurn[];
  /** Places at which steady states end without the condition turning there. */
  readonly edges: readonly Edge[];
  /** The machine at both ends of the range. */
  readonly ends: readonly [Looked, Looked];
  /** The same at the file's own number; null where the file leaves it out. */
  readonly given: Looked | null;
  /** Whether any place looked at has a steady state with that quantity. */
  readonly solved: boolean;
}

/** A place where the condition turns, with the machine a little below and above it. */
export interface BreakEvenTurn extends Turn {
  readonly below: Looked;
  readonly above: Looked;
}

/** Where and how closely to look. */
export interface BreakEvenOptions {
  /** In the variable's unit; left out, the key's legal range, or what lies around the file's own number. */
  readonly range?: readonly [number, number] | undefined;
  readonly overrides?: readonly Override[];
  /** Intervals scanned for a change of sign. */
  readonly scanned?: number;
}

/** The machine at one place. */
export interface Looked {
  readonly x: number;
  /** The condition's quantity, SI; null with a reason */
  readonly value: number | null;
  readonly met: boolean;
  /** Temperature of the coldest station, K; null without a steady state */
  readonly coldEnd: number | null;
  /** Whether liquid forms somewhere. */
  readonly wet: boolean;
  readonly reason: string | null;
}

/**
 * The numbers of a variable at which a condition turns, each a root of the quantity followed as a continuous one.
 *
 * @throws InputError where the variable moves in whole steps, or no range can be told
 */
export function breakEven(
  file: CycleFile,
  variable: Variable,
  condition: Condition,
  { range = defaultRange(variable), overrides = [], scanned = SCANNED }: BreakEvenOptions = {},
): BreakEven {
  if (variable.whole) throw refusal(variable, "a number that moves in whole steps", "a number that can take any value; sweep this one");
  const [from, to] = range;
  const { needs, name } = condition.quantity;
  const solveAt = (x: number) => solvePoint(file, [...overrides, variable.override(x)], needs === undefined ? {} : { needs });
  const missing = (result: SteadyState): string => [`no ${name}`, condition.quantity.missing?.(result) ?? "the machine has none"].join(": ");
  const follow: Followed = (x) => {
    const point = solveAt(x);
    return point.status === "solved" ? (condition.excess(point.result) ?? { reason: missing(point.result) }) : { reason: `${point.status}. ${point.reason}` };
  };
  const places = Array.from({ length: scanned + 1 }, (_, i) => (i === scanned ? to : from + ((to - from) * i) / scanned));
  const { turns, edges, scan } = crossings(follow, places);
  const solved = scan.some(({ value }) => value !== null);
  const given = variable.given === undefined ? null : look(variable.given);
  return { variable, condition, range, turns: turns.map(withSides), edges, ends: [look(from), look(to)], given, solved };

  /** Looks on either side, though no further than half the way to the next place at which anything changes. */
  function withSides(turn: Turn): BreakEvenTurn {
    const others = [from, to, ...turns.map(({ x }) => x), ...edges.map(({ x }) => x)].map((x) => Math.abs(x - turn.x));
    const aside = Math.min(ASIDE * (to - from), ...others.filter((distance) => distance > 0).map((distance) => distance / 2));
    return { ...turn, below: look(turn.x - aside), above: look(turn.x + aside) };
  }

  function look(x: number): Looked {
    const point = solveAt(x);
    if (point.status !== "solved") return { x, value: null, met: false, coldEnd: null, wet: false, reason: `${point.status}. ${point.reason}` };
    const { result } = point;
    const value = condition.quantity.get(result);
    const met = (condition.excess(result) ?? 0) < 0;
    return { x, value, met, coldEnd: result.coldEnd.temperature, wet: result.liquefaction.reached, reason: value === null ? missing(result) : null };
  }
}

/** The key's legal range where it has two bounds; else what lies around the file's own number. */
function defaultRange(variable: Variable): [number, number] {
  const { about, given } = variable;
  const { lowest, highest, open } = about.range;
  const inUnit = (value: number | undefined): number | undefined => (value === undefined ? undefined : variable.fromSI(value));
  let [from, to] = [inUnit(lowest), inUnit(highest)];
  if (from === undefined || to === undefined) {
    if (given === undefined || (given === 0 && about.dimension !== "temperature")) {
      throw refusal(variable, "a number without a legal range and without a value to look around", `a range, as in ${variable.address}=1..10${variable.unit === undefined ? "" : ` ${variable.unit}`}`);
    }
    const si = variable.toSI(given);
    const around = about.dimension === "temperature" ? [si - AROUND_TEMPERATURE, si + AROUND_TEMPERATURE] : [si / AROUND, si * AROUND];
    from = Math.max(from ?? -Infinity, variable.fromSI(Math.min(...around)));
    to = Math.min(to ?? Infinity, variable.fromSI(Math.max(...around)));
  }
  const margin = FROM_BOUND * (to - from);
  const lowestSI = variable.toSI(from);
  if ((open === "lowest" || open === "both") && lowestSI === lowest) from += margin;
  if ((open === "highest" || open === "both") && variable.toSI(to) === highest) to -= margin;
  return [from, to];
}

function refusal({ address }: Variable, found: string, expected: string): InputError {
  return new InputError([{ code: "variation", place: `--vary ${address}`, line: 0, column: 0, found, expected }]);
}
