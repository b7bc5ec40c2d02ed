import { InputError, type LocatedProblem } from "../cyclefile/errors.js";
import { nearest } from "../cyclefile/nearest.js";
import { plainQuantity } from "../cyclefile/quantity.js";
import { unitNames, type UnitKind } from "../cyclefile/units.js";
import type { StateInput } from "../fluids/fluid.js";

/** A property that helps to fix a state: what its values measure, and the names that a user may give it. */
interface Property {
  /** As `Fluid.at` calls it. */
  readonly name: string;
  readonly kind: UnitKind;
  readonly symbol: string;
  /** In words, for messages and for the headings of a table. */
  readonly words: string;
}

const PROPERTIES: readonly Property[] = [
  { name: "temperature", kind: "temperature", symbol: "T", words: "temperature" },
  { name: "pressure", kind: "pressure", symbol: "p", words: "pressure" },
  { name: "enthalpy", kind: "specific enthalpy", symbol: "h", words: "enthalpy" },
  { name: "entropy", kind: "specific entropy", symbol: "s", words: "entropy" },
  { name: "quality", kind: "fraction", symbol: "x", words: "vapour fraction" },
  { name: "density", kind: "density", symbol: "rho", words: "density" },
];

/** Kinds of unit that a value of a state may have. */
export const STATE_KINDS: readonly UnitKind[] = PROPERTIES.map(({ kind }) => kind);

/** Pairs that fix a state; of a table's columns the first that is there counts, for in a wet pure fluid T and p are no pair. */
export const PAIRS: readonly (readonly [string, string])[] = [
  ["pressure", "enthalpy"],
  ["pressure", "entropy"],
  ["pressure", "quality"],
  ["temperature", "density"],
  ["temperature", "pressure"],
];
const PAIRS_TEXT = "temperature with pressure or density, or pressure with enthalpy, entropy or vapour fraction";

/** Pa, the zero of gauge units where no surroundings are given: the standard atmosphere. */
export const ATMOSPHERE = 101325;

/** A value with its property before it: "h=200 kJ/kg". */
const NAMED = /^\s*([A-Za-z][A-Za-z -]*?)\s*=\s*(.*)$/;

/** The property that a symbol, a name or words mean, in any case: "h", "Enthalpy", "vapour_fraction", "vapour". */
export function propertyCalled(text: string): Property | undefined {
  const wanted = text.trim().toLowerCase().replaceAll(/[_-]/g, " ");
  return PROPERTIES.find(({ name, symbol, words }) => [name, symbol.toLowerCase(), words, words.split(" ")[0]].includes(wanted));
}

/**
 * The state that two values with their units fix, in any order: "100 K", "5 bar", "h=200 kJ/kg", "x=0.5".
 * @throws InputError
 */
export function stateInput(texts: readonly (string | undefined)[]): StateInput {
  const problems: LocatedProblem[] = [];
  const given: Record<string, number> = {};
  for (const text of texts) {
    if (text === undefined) continue;
    const read = valueOf(text);
    if ("code" in read) problems.push(read);
    else if (Object.hasOwn(given, read.name)) problems.push(problem(text, `a second ${propertyCalled(read.name)?.words}`, PAIRS_TEXT));
    else given[read.name] = read.value;
  }
  if (problems.length > 0) throw new InputError(problems);
  const names = Object.keys(given);
  if (!PAIRS.some((pair) => names.length === 2 && pair.every((name) => names.includes(name)))) {
    const found = names.map((name) => propertyCalled(name)?.words).join(" and ");
    throw new InputError([problem("state", names.length === 2 ? found : `${found || "no value"} alone`, PAIRS_TEXT)]);
  }
  return given as unknown as StateInput;
}

function valueOf(text: string): { name: string; value: number } | LocatedProblem {
  const [, symbol, written = text] = NAMED.exec(text) ?? [];
  const named = symbol === undefined ? undefined : propertyCalled(symbol);
  if (symbol !== undefined && named === undefined) {
    const expected = PROPERTIES.map((property) => `${property.symbol} (${property.words})`).join(", ");
    // Any letter is near to any other: only a word is worth a guess.
    const near = symbol.length > 2 ? nearest(symbol, PROPERTIES.map((property) => property.words)) : undefined;
    return problem(text, `the unknown property "${symbol}"`, expected, near);
  }
  const quantity = plainQuantity(written, ATMOSPHERE);
  if (quantity === "not plain") return problem(text, "no number with a unit", "a value such as '100 K', '5 bar' or 'h=200 kJ/kg'");
  if ("unknownUnit" in quantity) {
    return problem(text, `the unknown unit "${quantity.unknownUnit}"`, "a unit such as K, bar, kJ/kg", nearest(quantity.unknownUnit, unitNames(STATE_KINDS)));
  }
  const property = named ?? PROPERTIES.find(({ kind }) => kind === quantity.kind);
  if (property === undefined) return problem(text, `a ${quantity.kind}`, PAIRS_TEXT);
  const bare = quantity.kind === "fraction" && quantity.unit === undefined;
  if (quantity.kind !== property.kind || (bare && named === undefined)) {
    const found = bare ? "a number without a unit" : `a ${quantity.kind}`;
    return problem(text, found, named === undefined ? "a value such as '100 K', or x=0.5 for a vapour fraction" : `${property.words} in ${unitNames([property.kind]).join(", ")}`);
  }
  return { name: property.name, value: quantity.value };
}

function problem(place: string, found: string, expected: string, suggestion?: string): LocatedProblem {
  return { code: "state", place, line: 0, column: 0, found, expected, ...(suggestion === undefined ? {} : { suggestion }) };
}
