import type { CycleDefinition } from "../cycle/definition.js";
import type { SteadyState } from "../cycle/result.js";
import { InputError } from "../cyclefile/errors.js";
import { misfit, plainQuantity, type Quantity } from "../cyclefile/quantity.js";
import { unitNames } from "../cyclefile/units.js";
import { resultQuantities, resultQuantity, type ResultDimension, type ResultQuantity } from "./quantities.js";

/** Something that is true of a machine or not, followed as a continuous number so that the place where it turns is a root. */
export interface Condition {
  /** As the user wrote it. */
  readonly text: string;
  /** The result that it is about. */
  readonly quantity: ResultQuantity;
  /** The value that the result is compared with, SI. */
  readonly limit: number;
  /** Below zero where the condition is met; null where the machine has no such number. */
  excess(result: SteadyState): number | null;
}

const COMPARISON = /^(.+?)\s*(>=|<=|>|<)\s*(.+)$/;
/** Share of the limit within which a result equals it: the round-off of adding up. */
const ROUND_OFF = 1e-12;

/**
 * The condition that a text means: "liquefies", or a result with a value: "capacity > 20 W".
 * @throws InputError
 */
export function parseCondition(text: string, definition: CycleDefinition): Condition {
  if (text.trim() === "liquefies") {
    const margin = resultQuantities.find(({ name }) => name === "liquefaction.margin") as ResultQuantity;
    return { text: "liquefies", quantity: margin, limit: 0, excess: (result) => margin.get(result) };
  }
  const refuse = (found: string, expected: string): never => {
    throw new InputError([{ code: "condition", place: `"${text}"`, line: 0, column: 0, found, expected }]);
  };
  const match = COMPARISON.exec(text.trim());
  if (match === null) return refuse("no condition", 'liquefies, or a result compared with a value, as in "capacity > 20 W"');
  const [, name, operator, valueText] = match;
  const quantity = resultQuantity(name, definition);
  const value = plainQuantity(valueText, definition.surroundings.pressure);
  if (value === "not plain") return refuse(`"${valueText}"`, "one number with its unit");
  if ("unknownUnit" in value) return refuse(`the unknown unit "${value.unknownUnit}"`, "a unit such as W, K, bar or %");
  const wrong = complaint(value, quantity.dimension);
  if (wrong !== null) return refuse(wrong.found, wrong.expected);
  const sign = operator.startsWith(">") ? 1 : -1;
  // A number below zero, though no further than a number can be, lets ">=" hold where the result equals the limit.
  const equal = operator.endsWith("=") ? -Number.MIN_VALUE : 0;
  return {
    text: text.trim(),
    quantity,
    limit: value.value,
    excess: (result) => {
      const found = quantity.get(result);
      if (found === null) return null;
      const excess = sign * (value.value - found);
      return Math.abs(excess) <= ROUND_OFF * Math.abs(value.value) ? equal : excess;
    },
  };
}

/** What is wrong with a value to compare a result with, or null. */
function complaint(value: Quantity, dimension: ResultDimension): { found: string; expected: string } | null {
  if (dimension !== "mass flow") return misfit(value, dimension === "none" ? "fraction" : dimension);
  return value.kind === "mass flow" ? null : { found: value.unit ?? "a number without a unit", expected: `a mass flow: ${unitNames(["mass flow"]).join(", ")}` };
}
