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
  type MathNode,
  type MathType,
  type Unit as MathUnit,
} from "mathjs";
import type { Quantity } from "./quantity.js";
import { units, type UnitKind } from "./units.js";

/** An expression that cannot be evaluated. */
export class ExpressionError extends Error {
  constructor(
    readonly code: "expression-syntax" | "expression-refused" | "unknown-name" | "expression-units",
    readonly found: string,
    readonly expected: string,
    readonly unknown?: string,
  ) {
    super(found);
  }
}

/** Names and values that an expression may use. */
export type Scope = ReadonlyMap<string, Quantity>;

/** Functions of numbers and quantities that an expression may call. */
const FUNCTIONS = new Set(["sqrt", "abs", "exp", "log", "min", "max"]);
const OPERATORS = new Set(["+", "-", "*", "/", "^"]);
const PERCENTAGE = /(\d+\.?\d*(?:[eE][+-]?\d+)?|\.\d+)\s*%/g;

const math = create({
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
const SI_UNIT: Readonly<Record<Exclude<UnitKind, "fraction">, string>> = {
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

/** What the compound names of the unit table are made of: number and SI unit. */
const ATOMS: Readonly<Record<string, readonly [number, string]>> = {
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

/** Names that stand for a value in an expression: the atoms, and the simple units of the table. */
const values = new Map<string, MathType>([["pi", Math.PI]]);
for (const [name, [factor, unit]] of Object.entries(ATOMS)) values.set(name, math.unit(factor, unit));
for (const [name, { kind, factor, offset, gauge }] of Object.entries(units)) {
  if (kind === "fraction" || !/^\w+$/.test(name) || offset !== undefined || gauge !== undefined) continue;
  values.set(name, math.unit(factor, SI_UNIT[kind]));
}
/** Every name of a unit that an expression may hold. */
export const expressionUnits: readonly string[] = [...values.keys(), ...Object.keys(units).filter((name) => /^\w+$/.test(name))];

/**
 * Evaluates an expression of numbers, units and names, by mathjs without anything but arithmetic: an expression cannot
 * define, assign, index, or reach an object.
 *
 * @param surroundingsPressure Pa, the zero of gauge units
 * @throws ExpressionError
 */
export function evaluateExpression(text: string, scope: Scope, surroundingsPressure: number): Quantity {
  const tree = checked(parsed(text), scope, surroundingsPressure);
  const names = new Map<string, MathType>(values);
  // The function min would hide the minute.
  names.set("minute", values.get("min") as MathType);
  names.delete("min");
  for (const [name, quantity] of scope) {
    names.set(name, quantity.kind === "fraction" ? quantity.value : math.unit(quantity.value, SI_UNIT[quantity.kind]));
  }
  let result: unknown;
  try {
    result = tree.compile().evaluate(names);
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    throw new ExpressionError("expression-units", `"${text}", in which the units do not go together (${reason})`, "quantities of one kind to be added, and plain numbers in functions");
  }
  if (typeof result === "number") return { value: finite(result, text), kind: "fraction" };
  for (const [kind, unit] of Object.entries(SI_UNIT) as [Exclude<UnitKind, "fraction">, string][]) {
    const quantity = result as MathUnit;
    if (math.unit(1, unit).equalBase(quantity)) return { value: finite(quantity.toNumber(unit), text), kind };
  }
  throw new ExpressionError("expression-units", `"${text}", whose unit is none that a cycle file uses`, "a number, or a quantity such as a pressure, a temperature or a flow");
}

function parsed(text: string): MathNode {
  try {
    return math.parse(text.replace(PERCENTAGE, "($1/100)"));
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    throw new ExpressionError("expression-syntax", `"${text}", which cannot be read (${reason})`, "a value such as 8 bar, 62 % or p_high - 0.2 bar");
  }
}

/** The tree with scales that have a zero of their own turned into plain quantities; refuses all that is not arithmetic. */
function checked(tree: MathNode, scope: Scope, surroundingsPressure: number): MathNode {
  return tree.transform((node, path) => {
    const refuse = (what: string): never => {
      throw new ExpressionError("expression-refused", what, `numbers, units, names, + - * / ^ and ${[...FUNCTIONS].join(", ")}`);
    };
    if (math.isConstantNode(node)) return typeof node.value === "number" ? node : refuse(`the value ${JSON.stringify(node.value)}`);
    if (math.isParenthesisNode(node)) return node;
    if (math.isFunctionNode(node)) {
      const name = math.isSymbolNode(node.fn) ? node.fn.name : "";
      return FUNCTIONS.has(name) ? node : refuse(`a call of "${name === "" ? node.toString() : name}"`);
    }
    if (math.isOperatorNode(node)) {
      if (!OPERATORS.has(node.op)) return refuse(`the operator "${node.op}"`);
      const [number, scale] = node.args;
      if (node.implicit && scale !== undefined && math.isSymbolNode(scale) && !scope.has(scale.name)) {
        const unit = Object.hasOwn(units, scale.name) ? units[scale.name] : undefined;
        const zero = (unit?.offset ?? 0) + (unit?.gauge === true ? surroundingsPressure : 0);
        if (unit !== undefined && (unit.offset !== undefined || unit.gauge !== undefined)) {
          const { OperatorNode, ConstantNode, SymbolNode, ParenthesisNode } = math;
          const scaled = new OperatorNode("*", "multiply", [number, new ConstantNode(unit.factor)]);
          const sum = new ParenthesisNode(new OperatorNode("+", "add", [scaled, new ConstantNode(zero)]));
          return new OperatorNode("*", "multiply", [sum, new SymbolNode(unit.kind === "pressure" ? "Pa" : "K")]);
        }
      }
      return node;
    }
    if (math.isSymbolNode(node)) {
      const { name } = node;
      if (path === "fn") return node;
      if (name === "min" && !scope.has("min")) return new math.SymbolNode("minute");
      if (scope.has(name) || values.has(name) || name === "minute") return node;
      if (Object.hasOwn(units, name)) return refuse(`"${name}" without a number before it`);
      throw new ExpressionError("unknown-name", `the unknown name "${name}"`, "a name from let, or a unit", name);
    }
    return refuse(`"${node.toString()}"`);
  });
}

function finite(value: number, text: string): number {
  if (Number.isFinite(value)) return value;
  throw new ExpressionError("expression-units", `"${text}", which has no finite value`, "a finite number");
}
