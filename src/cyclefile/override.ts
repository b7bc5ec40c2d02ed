import { oneLine, type Complaint, type Document } from "./document.js";
import type { LocatedProblem } from "./errors.js";
import type { RawEntry, RawValue } from "./raw.js";

/** A value put in place of one in the file, or beside those there. */
export interface Override {
  readonly address: string;
  /** An expression with units, or a number in SI units. */
  readonly value: string | number;
}

/** Overrides by what they replace. */
export interface Overrides {
  readonly flow?: Override;
  readonly surroundings: ReadonlyMap<string, Override>;
  readonly let: ReadonlyMap<string, Override>;
  readonly keys: ReadonlyMap<RawEntry, ReadonlyMap<string, Override>>;
}

/** A value, wherever it was given. */
export type Given = RawValue | Override;

/** The text that a value is given by, or a number in SI units. */
export function written(given: Given): string | number {
  if (!("address" in given)) return given.text;
  return typeof given.value === "number" ? given.value : given.value.trim();
}

/** A complaint at the place of a value or an entry. */
export function located(document: Document, at: Given | RawEntry, complaint: Complaint): LocatedProblem {
  if (!("address" in at)) return document.problem(at.node, complaint);
  const { part: _part, ...rest } = complaint;
  return { ...rest, found: oneLine(rest.found), place: `--set ${at.address}=${at.value}`, line: 0, column: 0 };
}
