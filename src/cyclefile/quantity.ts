import type { Dimension } from "../blocks/keys.js";
import { toSI, unitNames, units, type UnitKind } from "./units.js";

/** What a value is asked to measure: a key's dimension, any flow, or what a named value measures. */
export type Measure = Dimension | "flow" | UnitKind;

/** A value with what it measures, in SI units. */
export interface Quantity {
  readonly value: number;
  /** "fraction" for a bare number too */
  readonly kind: UnitKind;
  /** The unit as written; undefined for a bare number or the result of an expression. */
  readonly unit?: string;
  /**
   * Which of the two a temperature or pressure is, where its unit has a zero of its own (degC, barg): a place on the scale, or the
   * difference of two places. Left out, it can be either: 5 K, 0.2 bar.
   */
  readonly scale?: "point" | "difference";
}

/** A text that is one number with at most one unit behind it: no expression has to be evaluated. */
const PLAIN = /^([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)\s*([A-Za-z%\u00B0\u00B5][\w%\u00B0\u00B3\u00B5/() ]*)?$/;
/** A unit's name that may be made of several, for the evaluator of expressions to work out. */
const COMPOUND = /^(?=.*[/ ()])[\w%/() ]+$/;
/** A lone name. */
const NAME = /^[A-Za-z_]\w*$/;

/** A plain value, or why the text is none: not of that form, or of a unit that there is not. */
export function plainQuantity(text: string, surroundingsPressure: number): Quantity | "not plain" | { unknownUnit: string } {
  const match = PLAIN.exec(text.trim());
  if (match === null) return "not plain";
  const number = Number(match[1]);
  const name = match[2]?.trim();
  // An endless number is left to the evaluator of expressions, which refuses it.
  if (!Number.isFinite(number)) return "not plain";
  if (name === undefined) return { value: number, kind: "fraction" };
  const unit = Object.hasOwn(units, name) ? units[name] : undefined;
  if (unit === undefined) return COMPOUND.test(name) ? "not plain" : { unknownUnit: name };
  const value = toSI(number, unit, surroundingsPressure);
  return unit.offset === undefined && unit.gauge === undefined ? { value, kind: unit.kind, unit: name } : { value, kind: unit.kind, unit: name, scale: "point" };
}

/** Whether a text needs an expression to be evaluated. */
export function needsExpression(text: string): boolean {
  const trimmed = text.trim();
  return trimmed !== "" && !NAME.test(trimmed) && plainQuantity(trimmed, 0) === "not plain";
}

/** Whether a text is a lone name. */
export function isName(text: string): boolean {
  return NAME.test(text.trim());
}

/** The unit that a foreign way of writing it means: 22 °C, 3 m³/h, 250 lpm. */
export function unitMeant(written: string): string | undefined {
  const plain = written.replaceAll("\u00B0", "deg").replaceAll("\u00B3", "3");
  if (Object.hasOwn(units, plain)) return plain;
  if (/^C(elsius)?$/i.test(written)) return "degC";
  if (/^F(ahrenheit)?$/i.test(written)) return "degF";
  return /^lpm$/i.test(written) ? "L/min" : undefined;
}

const FLOWS: readonly UnitKind[] = ["mass flow", "molar flow", "normal volume flow", "standard volume flow", "volume flow"];

/** The kinds of unit that a measure takes. */
function kindsFor(measure: Measure): readonly UnitKind[] | UnitKind {
  switch (measure) {
    case "count":
      return "fraction";
    case "temperature difference":
      return "temperature";
    case "pressure difference":
      return "pressure";
    case "flow":
      return FLOWS;
    default:
      return measure;
  }
}

/** Whether a kind of unit is one that a measure takes. */
export function fits(kind: UnitKind, measure: Measure): boolean {
  const kinds = kindsFor(measure);
  return typeof kinds === "string" ? kind === kinds : kinds.includes(kind);
}

/** What a measure accepts, in words: "a pressure: Pa, bar, psi, …". */
export function accepted(measure: Measure): string {
  if (measure === "fraction") return `a bare number, or one in ${unitNames(["fraction"]).join(" or ")}`;
  if (measure === "count") return "a bare number";
  if (measure === "temperature difference") return "a temperature difference in K";
  const kinds = kindsFor(measure);
  return `a ${measure}: ${unitNames(typeof kinds === "string" ? [kinds] : kinds, { gauge: measure !== "pressure difference" }).join(", ")}`;
}

/**
 * What is wrong with a quantity for a measure, or null.
 * A difference takes no unit with a zero of its own: 5 degC as a difference could mean 5 K or 278.15 K.
 */
export function misfit({ kind, unit, scale }: Quantity, measure: Measure): { found: string; expected: string } | null {
  if (!fits(kind, measure)) {
    return { found: kind !== "fraction" ? `a ${kind}` : unit === undefined ? "a number without a unit" : `a number in ${unit}`, expected: accepted(measure) };
  }
  if (measure === "temperature difference") {
    if (scale === "point") return { found: "a place on a temperature scale", expected: `${accepted(measure)}; degC and degF have a zero of their own, and a difference has none` };
    if (unit !== undefined && unit !== "K") return { found: `in ${unit}`, expected: accepted(measure) };
  }
  if (measure === "pressure difference" && scale === "point") return { found: "a pressure over the surroundings'", expected: `${accepted(measure)}; a difference has no gauge zero` };
  if ((measure === "temperature" || measure === "pressure") && scale === "difference") {
    return { found: `the difference of two ${measure}s`, expected: `a ${measure}` };
  }
  if (measure === "count" && unit !== undefined) return { found: `a number in ${unit}`, expected: accepted(measure) };
  return null;
}
