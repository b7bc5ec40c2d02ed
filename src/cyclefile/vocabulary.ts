import { units } from "./units.js";

/** Functions of numbers and quantities that an expression may call. */
export const FUNCTIONS: readonly string[] = ["sqrt", "abs", "exp", "log", "min", "max"];

/** What compound units of an expression are made of besides the simple units of the table: number and SI unit. */
export const ATOMS: Readonly<Record<string, readonly [number, string]>> = {
  kg: [1, "kg"],
  g: [1e-3, "kg"],
  lb: [0.45359237, "kg"],
  s: [1, "s"],
  min: [60, "s"],
  h: [3600, "s"],
  mol: [1, "mol"],
  kmol: [1e3, "mol"],
  J: [1, "J"],
  kJ: [1e3, "J"],
  Nm3: [1, "normalcubicmetre"],
  NL: [1e-3, "normalcubicmetre"],
};

/** Words with a meaning of their own in expressions. */
const WORDS: ReadonlySet<string> = new Set(["pi", "mod", "to", "in", "and", "or", "xor", "not", "true", "false", "null", "undefined", "NaN", "Infinity", "end"]);

/** What a name means besides what `let` could make of it; undefined where it is free. */
export function meaning(name: string): string | undefined {
  if (Object.hasOwn(units, name) || Object.hasOwn(ATOMS, name)) return "a unit";
  if (FUNCTIONS.includes(name)) return "a function";
  return WORDS.has(name) ? "a word of expressions" : undefined;
}
