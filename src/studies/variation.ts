import { InputError } from "../cyclefile/errors.js";
import type { CycleFile } from "../cyclefile/open.js";
import type { Override } from "../cyclefile/define.js";
import type { Addressed } from "../cyclefile/address.js";
import { plainQuantity } from "../cyclefile/quantity.js";
import { fromSI, toSI, units } from "../cyclefile/units.js";
import { keyComplaint } from "../cyclefile/values.js";

/** A number of the cycle file that a study moves, in the unit in which its user thinks of it. */
export interface Variable {
  readonly address: string;
  readonly about: Addressed;
  /** Undefined for a bare number. */
  readonly unit: string | undefined;
  /** Its only legal values are whole numbers. */
  readonly whole: boolean;
  /** The number as the file gives it, in `unit`; undefined where the file leaves it out. */
  readonly given: number | undefined;
  /** What puts a number of `unit` in the file's place. */
  override(value: number): Override;
  /** A number of `unit` in SI. */
  toSI(value: number): number;
  /** An SI value as a number of `unit`. */
  fromSI(value: number): number;
}

/** What a text under --vary asks for. */
export interface Variation {
  readonly variable: Variable;
  /** Numbers of the variable's unit, in the order asked for; undefined where the text names no range. */
  readonly values: readonly number[] | undefined;
  /** Lowest and highest number; undefined likewise. */
  readonly range: readonly [number, number] | undefined;
}

/**
 * The variation that a text means: an address alone, with a range "T1.efficiency=30%..80%", or with a list "C1.stages=1,2,3".
 * A unit at the end serves for all numbers before it.
 *
 * @param steps points of a range, both ends counted
 * @throws InputError
 */
export function parseVariation(text: string, file: CycleFile, overrides: readonly Override[], steps: number): Variation {
  const refuse = (found: string, expected: string): never => {
    throw new InputError([{ code: "variation", place: `--vary ${text}`, line: 0, column: 0, found, expected }]);
  };
  const at = text.indexOf("=");
  const address = (at < 0 ? text : text.slice(0, at)).trim();
  const about = addressed(file, address, overrides);
  const ambient = file.define(overrides).surroundings.pressure;
  if (at < 0) return { variable: variable(about, about.unit, ambient), values: undefined, range: undefined };

  const written = text.slice(at + 1).trim();
  const ends = written.split("..");
  if (ends.length > 2) return refuse(`"${written}"`, "two ends, as in 30%..80%");
  const texts = (ends.length === 2 ? ends : written.split(",")).map((each) => each.trim());
  const unit = unitOf(texts.at(-1) ?? "");
  const numbers = texts.map((each) => {
    const whole = unit !== undefined && unitOf(each) === undefined ? `${each} ${unit}` : each;
    const quantity = plainQuantity(whole, ambient);
    if (quantity === "not plain") return refuse(each === "" ? "a value left out" : `"${each}"`, "a number with its unit");
    if ("unknownUnit" in quantity) return refuse(`the unknown unit "${quantity.unknownUnit}"`, "a unit such as bar, degC, g/s, W or %");
    const complaint = keyComplaint(quantity, whole, about.dimension, about.range, ambient);
    if (complaint !== null) return refuse(complaint.found, complaint.expected);
    return quantity;
  });
  const moved = variable(about, unit, ambient);
  const inUnit = numbers.map(({ value }) => cleaned(moved.fromSI(value)));
  if (ends.length === 1) return { variable: moved, values: inUnit, range: [Math.min(...inUnit), Math.max(...inUnit)] };
  const [from, to] = inUnit;
  if (from === to) return refuse(`"${written}", a range without width`, "two different ends");
  return { variable: moved, values: spread(from, to, steps, moved.whole), range: [Math.min(from, to), Math.max(from, to)] };
}

/** What an address stands for, with a value from --set in place of the file's. */
function addressed(file: CycleFile, address: string, overrides: readonly Override[]): Addressed {
  const about = file.address(address);
  const set = overrides.findLast((override) => override.address === address);
  if (set === undefined) return about;
  if (typeof set.value === "number") return { ...about, given: set.value };
  const quantity = plainQuantity(set.value, file.define(overrides).surroundings.pressure);
  if (quantity === "not plain" || "unknownUnit" in quantity) return { ...about, given: undefined, unit: undefined };
  return { ...about, given: quantity.value, unit: quantity.unit };
}

function variable(about: Addressed, written: string | undefined, ambient: number): Variable {
  const name = written ?? UNWRITTEN[about.dimension];
  const unit = name === undefined ? { kind: "fraction" as const, factor: 1 } : units[name];
  return {
    address: about.address,
    about,
    unit: name,
    whole: about.dimension === "count",
    given: about.given === undefined ? undefined : cleaned(fromSI(about.given, unit, ambient)),
    // A number without a unit means what the file's own value means, whatever kind of flow that is.
    override: (value) => ({ address: about.address, value: name === undefined ? value : `${value} ${name}` }),
    toSI: (value) => toSI(value, unit, ambient),
    fromSI: (value) => fromSI(value, unit, ambient),
  };
}

/** Units in which numbers are shown that are left out of the file, or written there as expressions. */
const UNWRITTEN: Partial<Record<Addressed["dimension"], string>> = {
  temperature: "K",
  "temperature difference": "K",
  pressure: "bar",
  "pressure difference": "bar",
  power: "W",
  conductance: "W/K",
  volume: "L",
  "specific enthalpy": "kJ/kg",
};

/** The unit behind a number. */
function unitOf(text: string): string | undefined {
  const name = /^[+-]?[\d.]+(?:[eE][+-]?\d+)?\s*(.*)$/.exec(text)?.[1].trim();
  return name === "" || name === undefined || !Object.hasOwn(units, name) ? undefined : name;
}

/** Evenly spread numbers, both ends included; whole ones of a count. */
function spread(from: number, to: number, steps: number, whole: boolean): number[] {
  const numbers = Array.from({ length: steps }, (_, i) => cleaned(from + ((to - from) * i) / (steps - 1)));
  return whole ? [...new Set(numbers.map(Math.round))] : numbers;
}

/** Without the round-off of its making: 0.3 and not 0.30000000000000004. */
function cleaned(value: number): number {
  return Number(value.toPrecision(12));
}
