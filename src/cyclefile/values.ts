import type { NumberKey } from "../blocks/keys.js";
import { shortened, type Complaint } from "./document.js";
import { nearest, suggested } from "./nearest.js";
import { isName, misfit, plainQuantity, unitMeant, type Measure, type Quantity } from "./quantity.js";
import { fromSI, unitNames, units } from "./units.js";

/** What a value may refer to. */
export interface Scope {
  /** The quantity of a name; undefined where there is no such name, null where its own value is at fault. */
  get(name: string): Quantity | null | undefined;
  names(): Iterable<string>;
  /** Pa, the zero of gauge units; NaN where it is itself at fault */
  surroundingsPressure(): number;
}

/** Evaluates what is no plain value. Null where a name in it is at fault, which has been complained of. */
export type Evaluate = (text: string, scope: Scope) => Quantity | Complaint | null;

/** The quantity that a text means, a complaint, or null where its fault has been complained of already. */
export function quantityOf(text: string, scope: Scope, evaluate: Evaluate | undefined): Quantity | Complaint | null {
  if (isName(text)) return scope.get(text) ?? (scope.get(text) === null ? null : unknownName(text, scope.names()));
  const plain = plainQuantity(text, 0);
  if (plain !== "not plain") {
    if ("unknownUnit" in plain) return unknownUnit(plain.unknownUnit);
    const gauge = plain.unit !== undefined && units[plain.unit].gauge === true;
    if (!gauge) return plain;
    const zero = scope.surroundingsPressure();
    return Number.isNaN(zero) ? null : { ...plain, value: plain.value + zero };
  }
  if (text === "") return { code: "no-value", found: "no value", expected: "a value such as 8 bar or 62 %" };
  if (/\d,\d/.test(text) && !text.includes("(")) return { code: "expression-syntax", found: `"${shortened(text)}"`, expected: "a decimal point and no comma" };
  if (evaluate === undefined) throw new Error("an expression was met without the evaluator for it");
  return evaluate(text, scope);
}

/** Whether a result of `quantityOf` is a quantity. */
export function isQuantity(result: Quantity | Complaint | null): result is Quantity {
  return result !== null && "value" in result;
}

/** A name that stands for nothing. */
export function unknownName(name: string, known: Iterable<string>): Complaint {
  if (Object.hasOwn(units, name)) return { code: "unknown-name", found: `"${name}" without a number before it`, expected: `a value such as 1 ${name}`, part: name };
  const names = [...known];
  const suggestion = nearest(name, names);
  return { code: "unknown-name", found: `the unknown name "${shortened(name)}"`, expected: names.length === 0 ? "a number with its unit, or a name under let" : `a number with its unit, or a name from let: ${names.join(", ")}`, part: name, ...suggested(suggestion) };
}

function unknownUnit(name: string): Complaint {
  const suggestion = unitMeant(name) ?? nearest(name, Object.keys(units));
  return { code: "unknown-unit", found: `the unknown unit "${shortened(name)}"`, expected: "a unit such as bar, degC, g/s or W", part: name, ...suggested(suggestion) };
}

/** What is wrong with a quantity under a number key: its dimension, then its range. */
export function keyComplaint(quantity: Quantity, text: string, measure: Measure, range: NumberKey["range"], surroundingsPressure: number): Complaint | null {
  const wrong = misfit(quantity, measure);
  if (wrong !== null) return { code: "dimension", found: `"${shortened(text)}", ${wrong.found}`, expected: wrong.expected };
  return rangeComplaint(quantity, text, measure, range, surroundingsPressure);
}

/** What is wrong with the size of a number that fits in kind. */
export function rangeComplaint({ value, unit }: Pick<Quantity, "value" | "unit">, text: string, measure: Measure, range: NumberKey["range"], surroundingsPressure: number): Complaint | null {
  const { lowest = -Infinity, highest = Infinity, open } = range;
  const fromBelow = value > lowest || (value === lowest && open !== "lowest" && open !== "both");
  const fromAbove = value < highest || (value === highest && open !== "highest" && open !== "both");
  const found = (): string => `"${shortened(text)}"`;
  if (!fromBelow || !fromAbove) return { code: "range", found: found(), expected: rangeText(range, measure, unit, surroundingsPressure) };
  if (measure === "count" && !Number.isInteger(value)) return { code: "not-whole", found: found(), expected: "a whole number" };
  return null;
}

/** A range in the unit that the value was written in. */
export function rangeText({ lowest, highest, open }: NumberKey["range"], measure: Measure, unitName: string | undefined, surroundingsPressure: number): string {
  const name = unitName ?? usualUnit(measure);
  const unit = name === undefined ? undefined : units[name];
  const show = (value: number): string => {
    const shown = unit === undefined ? value : fromSI(value, unit, surroundingsPressure);
    return `${Number(shown.toPrecision(6))}${name === undefined ? "" : ` ${name}`}`;
  };
  const parts: string[] = [];
  if (lowest !== undefined) parts.push(`${open === "lowest" || open === "both" ? "more than" : "at least"} ${show(lowest)}`);
  if (highest !== undefined) parts.push(`${open === "highest" || open === "both" ? "less than" : "at most"} ${show(highest)}`);
  return parts.length === 0 ? "a finite number" : parts.join(" and ");
}

/** The unit in which a value is shown where nothing was written. */
function usualUnit(measure: Measure): string | undefined {
  switch (measure) {
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
      return unitNames([measure])[0];
  }
}
