import { InputError } from "../cyclefile/errors.js";
import { nearest } from "../cyclefile/nearest.js";
import { plainQuantity } from "../cyclefile/quantity.js";
import { units, type UnitKind } from "../cyclefile/units.js";
import type { StateInput } from "../fluids/fluid.js";

/** What a value of each kind is of a state. */
const PROPERTIES: Partial<Record<UnitKind, string>> = {
  temperature: "temperature",
  pressure: "pressure",
  "specific enthalpy": "enthalpy",
  "specific entropy": "entropy",
  fraction: "quality",
  density: "density",
};

/** Pairs that fix a state. */
const PAIRS = ["temperature pressure", "pressure enthalpy", "pressure entropy", "pressure quality", "temperature density"];
const PAIRS_TEXT = "temperature and pressure, pressure and enthalpy, pressure and entropy, pressure and vapour fraction, or temperature and density";

/** Pa, the zero of gauge units where no surroundings are given: the standard atmosphere. */
const ATMOSPHERE = 101325;

/**
 * The state that two values with their units fix.
 * @throws InputError
 */
export function stateInput(texts: readonly (string | undefined)[]): StateInput {
  const given: Record<string, number> = {};
  const problems = texts.flatMap((text) => {
    if (text === undefined) return [problem("a state", "one value only or none", PAIRS_TEXT)];
    const quantity = plainQuantity(text, ATMOSPHERE);
    if (quantity === "not plain") return [problem(text, `"${text}"`, "a number with its unit, as in '100 K' or '5 bar'")];
    if ("unknownUnit" in quantity) {
      const suggestion = nearest(quantity.unknownUnit, Object.keys(units));
      return [{ ...problem(text, `the unknown unit "${quantity.unknownUnit}"`, "a unit such as K, bar or kJ/kg"), ...(suggestion === undefined ? {} : { suggestion }) }];
    }
    const property = PROPERTIES[quantity.kind];
    if (property === undefined) return [problem(text, `a ${quantity.kind}`, PAIRS_TEXT)];
    given[property] = quantity.value;
    return [];
  });
  if (problems.length > 0) throw new InputError(problems);
  return pairOf(given, texts.join(" "));
}

/**
 * The input that two named values (SI) make.
 * @throws InputError where they are no pair that fixes a state
 */
export function pairOf(given: Readonly<Record<string, number>>, place: string): StateInput {
  const names = Object.keys(given);
  const pair = PAIRS.find((each) => names.length === 2 && each.split(" ").every((name) => names.includes(name)));
  if (pair === undefined) throw new InputError([problem(place, names.join(" and ") || "nothing", PAIRS_TEXT)]);
  return given as unknown as StateInput;
}

function problem(place: string, found: string, expected: string) {
  return { code: "state", place, line: 0, column: 0, found, expected };
}
