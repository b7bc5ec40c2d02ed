import { units, type UnitKind } from "./units.js";

/** Functions of numbers and quantities that an expression may call. */
export const FUNCTIONS: readonly string[] = ["sqrt", "abs", "exp", "log", "min", "max"];

/**
 * Exponents of kg, m, s, K, mol, and of the cubic metre of gas at the normal and at the standard state, which are amounts of gas
 * that do not convert into volumes.
 */
export type Dimensions = readonly number[];

const kg: Dimensions = [1, 0, 0, 0, 0, 0, 0];
const m: Dimensions = [0, 1, 0, 0, 0, 0, 0];
const s: Dimensions = [0, 0, 1, 0, 0, 0, 0];
const K: Dimensions = [0, 0, 0, 1, 0, 0, 0];
const mol: Dimensions = [0, 0, 0, 0, 1, 0, 0];
const normal: Dimensions = [0, 0, 0, 0, 0, 1, 0];
const standard: Dimensions = [0, 0, 0, 0, 0, 0, 1];
const joule = product([kg, 1], [m, 2], [s, -2]);

/** What each kind of unit measures. */
export const DIMENSIONS: Readonly<Record<UnitKind, Dimensions>> = {
  fraction: product(),
  temperature: K,
  pressure: product([kg, 1], [m, -1], [s, -2]),
  "mass flow": product([kg, 1], [s, -1]),
  "molar flow": product([mol, 1], [s, -1]),
  "normal volume flow": product([normal, 1], [s, -1]),
  "standard volume flow": product([standard, 1], [s, -1]),
  "volume flow": product([m, 3], [s, -1]),
  power: product([joule, 1], [s, -1]),
  conductance: product([joule, 1], [s, -1], [K, -1]),
  volume: product([m, 3]),
  length: m,
  "specific enthalpy": product([joule, 1], [kg, -1]),
  "specific entropy": product([joule, 1], [kg, -1], [K, -1]),
  density: product([kg, 1], [m, -3]),
};

/** A unit within an expression. */
export interface ExpressionUnit {
  /** SI units in one of it */
  readonly factor: number;
  readonly dimensions: Dimensions;
}

const MINUTE = 60;
const HOUR = 3600;

/** What compound units are made of besides the simple units of the table. */
const ATOMS: Readonly<Record<string, ExpressionUnit>> = {
  kg: { factor: 1, dimensions: kg },
  g: { factor: 1e-3, dimensions: kg },
  lb: { factor: 0.45359237, dimensions: kg },
  s: { factor: 1, dimensions: s },
  min: { factor: MINUTE, dimensions: s },
  h: { factor: HOUR, dimensions: s },
  mol: { factor: 1, dimensions: mol },
  kmol: { factor: 1e3, dimensions: mol },
  J: { factor: 1, dimensions: joule },
  kJ: { factor: 1e3, dimensions: joule },
  Nm3: { factor: 1, dimensions: normal },
  NL: { factor: 1e-3, dimensions: normal },
};

/** The units that may stand by themselves in an expression: the atoms, and those of the table without a zero of their own. */
export const expressionUnits: ReadonlyMap<string, ExpressionUnit> = new Map([
  ...Object.entries(ATOMS),
  ...Object.entries(units)
    .filter(([name, { offset, gauge }]) => /^\w+$/.test(name) && offset === undefined && gauge === undefined)
    .map(([name, { kind, factor }]): [string, ExpressionUnit] => [name, { factor, dimensions: DIMENSIONS[kind] }]),
]);

/** Words with a meaning of their own in expressions. */
const WORDS: ReadonlySet<string> = new Set(["pi", "mod", "to", "in", "and", "or", "xor", "not", "true", "false", "null", "undefined", "NaN", "Infinity", "end"]);

/** What a name means besides what `let` could make of it; undefined where it is free. */
export function meaning(name: string): string | undefined {
  if (Object.hasOwn(units, name) || Object.hasOwn(ATOMS, name)) return "a unit";
  if (FUNCTIONS.includes(name)) return "a function";
  return WORDS.has(name) ? "a word of expressions" : undefined;
}

/** The dimensions of a product of powers. */
export function product(...powers: readonly (readonly [Dimensions, number])[]): Dimensions {
  const result = [0, 0, 0, 0, 0, 0, 0];
  for (const [dimensions, exponent] of powers) dimensions.forEach((each, i) => (result[i] += each * exponent));
  return result;
}

/** Whether two quantities can be added. */
export function alike(a: Dimensions, b: Dimensions): boolean {
  return a.every((each, i) => Math.abs(each - b[i]) < 1e-9);
}
