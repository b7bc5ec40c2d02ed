import type { ResultDimension } from "../studies/quantities.js";
import { fixed, significant } from "./numbers.js";

/** How results of a dimension are printed for a person and in a spreadsheet. */
export interface Shown {
  /** "" for a bare number */
  readonly unit: string;
  /** An SI value in `unit`. */
  readonly scale: (value: number) => number;
  /** A number of `unit` as text. */
  readonly write: (value: number) => string;
}

const times = (factor: number) => (value: number) => value * factor;
const digits = (count: number) => (value: number) => significant(value, count);
const decimals = (count: number) => (value: number) => fixed(value, count);

const SHOWN: Readonly<Record<ResultDimension, Shown>> = {
  fraction: { unit: "%", scale: times(100), write: decimals(2) },
  count: { unit: "", scale: times(1), write: String },
  none: { unit: "", scale: times(1), write: digits(4) },
  temperature: { unit: "K", scale: times(1), write: decimals(2) },
  "temperature difference": { unit: "K", scale: times(1), write: decimals(2) },
  pressure: { unit: "bar", scale: times(1e-5), write: digits(4) },
  "pressure difference": { unit: "bar", scale: times(1e-5), write: digits(3) },
  power: { unit: "W", scale: times(1), write: digits(5) },
  conductance: { unit: "W/K", scale: times(1), write: digits(4) },
  volume: { unit: "L", scale: times(1e3), write: digits(4) },
  "specific enthalpy": { unit: "kJ/kg", scale: times(1e-3), write: decimals(2) },
  "mass flow": { unit: "g/s", scale: times(1e3), write: digits(4) },
};

/** How results of a dimension are shown. */
export function shownAs(dimension: ResultDimension): Shown {
  return SHOWN[dimension];
}

/** A result with its unit; "none" where there is none. */
export function resultText(value: number | null, dimension: ResultDimension): string {
  if (value === null) return "none";
  const { unit, scale, write } = shownAs(dimension);
  return withUnit(write(scale(value)), unit);
}

/** A text with its unit behind it, if it has one. */
export function withUnit(text: string, unit: string | undefined): string {
  return unit === undefined || unit === "" ? text : `${text} ${unit}`;
}
