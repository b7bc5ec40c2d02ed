import type { Dimension } from "../blocks/keys.js";
import { toSI, unitNames, units, type UnitKind } from "./units.js";

/** A value with what it measures, in SI units. */
export interface Quantity {
  readonly value: number;
  /** "fraction" for a bare number too */
  readonly kind: UnitKind;
  /** The unit as written; undefined for a bare number or the result of an expression. */
  readonly unit?: string;
}

/** A text that is one number with at most one unit behind it: no expression has to be evaluated. */
const PLAIN = /^([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)\s*([A-Za-z%][A-Za-z0-9/() ]*)?$/;
/** A lone name. */
const NAME = /^[A-Za-z_]\w*$/;

/** A plain value, or why the text is none: not of that form, or of a unit that there is not. */
export function plainQuantity(text: string, surroundingsPressure: number): Quantity | "not plain" | { unknownUnit: string } {
  const match = PLAIN.exec(text.trim());
  if (match === null) return "not plain";
  const number = Number(match[1]);
  const name = match[2]?.trim();
  if (name === undefined) return { value: number, kind: "fraction" };
  const unit = Object.hasOwn(units, name) ? units[name] : undefined;
  if (unit === undefined) return /[/ ()]/.test(name) ? "not plain" : { unknownUnit: name };
  return { value: toSI(number, unit, surroundingsPressure), kind: unit.kind, unit: name };
}

/** Whether a text needs an expression to be evaluated. */
export function needsExpression(text: string): boolean {
  const trimmed = text.trim();
  return !NAME.test(trimmed) && plainQuantity(trimmed, 0) === "not plain";
}

/** Whether a text is a lone name. */
export function isName(text: string): boolean {
  return NAME.test(text.trim());
}

/** What a key's dimension accepts, and how to say so. */
export interface Accepted {
  readonly kinds: readonly UnitKind[];
  /** "a pressure: Pa, bar, psi, …" */
  readonly description: string;
}

/** Which units a dimension takes. */
export function accepted(dimension: Dimension | "flow"): Accepted {
  switch (dimension) {
    case "fraction":
      return { kinds: ["fraction"], description: "a bare number or a percentage" };
    case "count":
      return { kinds: ["fraction"], description: "a bare number" };
    case "temperature difference":
      return { kinds: ["temperature"], description: "a temperature difference in K" };
    case "pressure difference":
      return listed("a pressure difference", ["pressure"], false);
    case "flow":
      return listed("a flow", ["mass flow", "molar flow", "normal volume flow", "standard volume flow", "volume flow"]);
    default:
      return listed(`a ${dimension}`, [dimension]);
  }
}

function listed(what: string, kinds: readonly UnitKind[], gauge = true): Accepted {
  return { kinds, description: `${what}: ${unitNames(kinds, { gauge }).join(", ")}` };
}

/**
 * What is wrong with a quantity for a dimension, or null.
 * A difference takes no unit with a zero of its own: 5 degC as a difference could mean 5 K or 278.15 K.
 */
export function misfit({ kind, unit }: Quantity, dimension: Dimension | "flow"): { found: string; expected: string } | null {
  const { kinds, description } = accepted(dimension);
  if (!kinds.includes(kind)) {
    if (kind === "fraction" && unit === undefined) return { found: "a number without a unit", expected: description };
    return { found: `${unit === undefined ? "" : `${unit}, `}a ${kind}`, expected: description };
  }
  if (unit === undefined) return null;
  const { offset, gauge } = units[unit];
  if (dimension === "temperature difference" && (offset !== undefined || unit !== "K")) {
    return { found: `${unit}, a temperature on a scale`, expected: "a temperature difference, which takes K only: its degrees have no zero" };
  }
  if (dimension === "pressure difference" && gauge === true) {
    return { found: `${unit}, a pressure over the surroundings'`, expected: `${description} (a difference has no gauge zero)` };
  }
  if (dimension === "count" && unit === "%") return { found: "a percentage", expected: description };
  return null;
}
