import {
  absDependencies,
  addDependencies,
  create,
  createUnitDependencies,
  divideDependencies,
  expDependencies,
  logDependencies,
  maxDependencies,
  minDependencies,
  multiplyDependencies,
  parseDependencies,
  powDependencies,
  sqrtDependencies,
  subtractDependencies,
  unaryMinusDependencies,
  unaryPlusDependencies,
  unitDependencies,
  type MathType,
} from "mathjs";
import { units, type UnitKind } from "./units.js";
import { ATOMS } from "./vocabulary.js";

/** mathjs with what arithmetic takes and nothing else. */
export const math = create({
  absDependencies,
  addDependencies,
  createUnitDependencies,
  divideDependencies,
  expDependencies,
  logDependencies,
  maxDependencies,
  minDependencies,
  multiplyDependencies,
  parseDependencies,
  powDependencies,
  sqrtDependencies,
  subtractDependencies,
  unaryMinusDependencies,
  unaryPlusDependencies,
  unitDependencies,
});

// Gas volumes at different reference states do not convert into one another.
math.createUnit("normalcubicmetre");
math.createUnit("standardcubicmetre");

/** The unit in which the SI value of each kind is read. */
export const SI_UNIT: Readonly<Record<Exclude<UnitKind, "fraction">, string>> = {
  temperature: "K",
  pressure: "Pa",
  "mass flow": "kg / s",
  "molar flow": "mol / s",
  "normal volume flow": "normalcubicmetre / s",
  "standard volume flow": "standardcubicmetre / s",
  "volume flow": "m^3 / s",
  power: "W",
  conductance: "W / K",
  volume: "m^3",
  length: "m",
  "specific enthalpy": "J / kg",
  "specific entropy": "J / kg / K",
  density: "kg / m^3",
};

/** The minute, whose own name is a function's. */
export const MINUTE = "minute";

/** Names that stand for a value in an expression: the atoms, and the table's units without a zero of their own. */
export const unitValues = new Map<string, MathType>([["pi", Math.PI]]);
for (const [name, [factor, unit]] of Object.entries(ATOMS)) unitValues.set(name === "min" ? MINUTE : name, math.unit(factor, unit));
for (const [name, { kind, factor, offset, gauge }] of Object.entries(units)) {
  if (!/^\w+$/.test(name) || offset !== undefined || gauge !== undefined) continue;
  unitValues.set(name, kind === "fraction" ? factor : math.unit(factor, SI_UNIT[kind]));
}
