import type { Dimension, NumberKey } from "../blocks/keys.js";
import type { Complaint } from "./document.js";
import { nearest } from "./nearest.js";
import { isName, misfit, plainQuantity, type Quantity } from "./quantity.js";
import { fromSI, unitNames, units } from "./units.js";

/** Evaluates what is no plain value; throws an ExpressionError. */
export type Evaluate = (text: string, scope: ReadonlyMap<string, Quantity>, surroundingsPressure: number) => Quantity;

/** What a value may refer to. */
export interface Context {
  readonly scope: ReadonlyMap<string, Quantity>;
  /** Names whose own value is at fault: what uses them is not complained of again. */
  readonly spoilt: ReadonlySet<string>;
  /** Pa */
  readonly surroundingsPressure: number;
  readonly evaluate: Evaluate | undefined;
}

/** The quantity that a text means, a complaint, or null where its fault has been reported already. */
export function quantityOf(text: string, context: Context): Quantity | Complaint | null {
  const { scope, spoilt, surroundingsPressure, evaluate } = context;
  const trimmed = text.trim();
  if (isName(trimmed)) {
    const named = scope.get(trimmed);
    if (named !== undefined) return named;
    if (spoilt.has(trimmed)) return null;
    const suggestion = nearest(trimmed, scope.keys());
    return { code: "unknown-name", found: `the unknown name "${trimmed}"`, expected: "a value with its unit, or a name from let above", ...(suggestion === undefined ? {} : { suggestion }) };
  }
  const plain = plainQuantity(trimmed, surroundingsPressure);
  if (plain !== "not plain") {
    if (!("unknownUnit" in plain)) return plain;
    const suggestion = nearest(plain.unknownUnit, Object.keys(units));
    return { code: "unknown-unit", found: `the unknown unit "${plain.unknownUnit}"`, expected: "a unit such as bar, degC, g/s or W", ...(suggestion === undefined ? {} : { suggestion }) };
  }
  if (trimmed === "") return { code: "no-value", found: "no value", expected: "a value such as 8 bar or 62 %" };
  if ([...spoilt].some((name) => new RegExp(`\\b${name}\\b`).test(trimmed))) return null;
  if (evaluate === undefined) throw new Error("an expression was met without the evaluator for it");
  try {
    return evaluate(trimmed, scope, surroundingsPressure);
  } catch (error) {
    if (!(error instanceof Error) || !("code" in error)) throw error;
    const fault = error as Error & Complaint & { unknown?: string };
    const suggestion = fault.unknown === undefined ? undefined : nearest(fault.unknown, [...scope.keys(), ...Object.keys(units)]);
    return { code: fault.code, found: fault.found, expected: fault.expected, ...(suggestion === undefined ? {} : { suggestion }) };
  }
}

/** Whether a result of `quantityOf` is a quantity. */
export function isQuantity(result: Quantity | Complaint | null): result is Quantity {
  return result !== null && "value" in result;
}

/** What is wrong with a quantity under a number key: its dimension, then its range. */
export function keyComplaint(quantity: Quantity, text: string, dimension: Dimension | "flow", range: NumberKey["range"], surroundingsPressure: number): Complaint | null {
  const wrong = misfit(quantity, dimension);
  if (wrong !== null) return { code: "dimension", found: `"${text}", ${wrong.found}`, expected: wrong.expected };
  const { lowest, highest, open } = range;
  const tooLow = lowest !== undefined && (quantity.value < lowest || (quantity.value === lowest && (open === "lowest" || open === "both")));
  const tooHigh = highest !== undefined && (quantity.value > highest || (quantity.value === highest && (open === "highest" || open === "both")));
  if (!tooLow && !tooHigh) return null;
  return { code: "range", found: `"${text}"`, expected: rangeText(range, dimension, quantity.unit, surroundingsPressure) };
}

/** A range in the unit that the value was written in. */
export function rangeText({ lowest, highest, open }: NumberKey["range"], dimension: Dimension | "flow", unitName: string | undefined, surroundingsPressure: number): string {
  const name = unitName ?? defaultUnit(dimension);
  const unit = name === undefined ? undefined : units[name];
  const show = (value: number): string => {
    const shown = unit === undefined ? value : fromSI(value, unit, surroundingsPressure);
    return `${Number(shown.toPrecision(6))}${name === undefined ? "" : ` ${name}`}`;
  };
  const parts: string[] = [];
  if (lowest !== undefined) parts.push(`${open === "lowest" || open === "both" ? "more than" : "at least"} ${show(lowest)}`);
  if (highest !== undefined) parts.push(`${open === "highest" || open === "both" ? "less than" : "at most"} ${show(highest)}`);
  return parts.join(" and ");
}

/** The unit in which a value of a dimension is shown where nothing was written. */
function defaultUnit(dimension: Dimension | "flow"): string | undefined {
  switch (dimension) {
    case "fraction":
    case "count":
      return undefined;
    case "temperature difference":
      return "K";
    case "pressure":
    case "pressure difference":
      return "bar";
    case "flow":
      return "kg/s";
    default:
      return unitNames([dimension])[0];
  }
}
