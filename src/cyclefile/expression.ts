import type { EvalFunction, MathNode, MathType, OperatorNode, SymbolNode, Unit as MathUnit } from "mathjs";
import { shortened, type Complaint } from "./document.js";
import { math, MINUTE, SI_UNIT, unitValues } from "./mathjs.js";
import { nearest, suggested } from "./nearest.js";
import type { Quantity } from "./quantity.js";
import { scaleOf, scaleUnit, SumOfPoints } from "./scale.js";
import { units, type Unit, type UnitKind } from "./units.js";
import { unknownName, type Scope } from "./values.js";
import { FUNCTIONS } from "./vocabulary.js";

const OPERATORS = new Set(["+", "-", "*", "/", "^"]);
/** The surroundings' pressure within an expression; no user can write the name. */
const GAUGE_ZERO = "gauge zero";
/** Expressions kept compiled; a sweep over an expression would otherwise fill the memory. */
const MOST_COMPILED = 500;

/** An expression ready to be evaluated with any values of its names. */
interface Compiled {
  readonly tree: MathNode;
  readonly code: EvalFunction;
  /** Names that are no unit's. */
  readonly names: readonly string[];
  readonly gauge: boolean;
}

class Refused extends Error {
  constructor(readonly complaint: Complaint) {
    super(complaint.found);
  }
}

const compiled = new Map<string, Compiled | Complaint>();

/**
 * Evaluates an expression of numbers, units and names by mathjs, without anything but arithmetic: an expression cannot define,
 * assign, index, or reach an object. Temperatures and gauge pressures are taken from absolute zero before anything is done to them.
 */
export function evaluateExpression(text: string, scope: Scope): Quantity | Complaint | null {
  let expression = compiled.get(text);
  if (expression === undefined) {
    expression = compile(text);
    if (compiled.size >= MOST_COMPILED) compiled.clear();
    compiled.set(text, expression);
  }
  return "found" in expression ? expression : evaluate(text, expression, scope);
}

function evaluate(text: string, { tree, code, names, gauge }: Compiled, scope: Scope): Quantity | Complaint | null {
  const quantities = new Map<string, Quantity>();
  const values = new Map<string, MathType>(unitValues);
  for (const name of names) {
    const quantity = scope.get(name);
    if (quantity === null) return null;
    if (quantity === undefined) return unknown(name, scope);
    quantities.set(name, quantity);
    values.set(name, quantity.kind === "fraction" ? quantity.value : math.unit(quantity.value, SI_UNIT[quantity.kind]));
  }
  if (gauge) {
    const zero = scope.surroundingsPressure();
    if (Number.isNaN(zero)) return null;
    values.set(GAUGE_ZERO, zero);
  }
  let result: unknown;
  let scale: Quantity["scale"];
  try {
    scale = scaleOf(tree, (name) => quantities.get(name));
    result = code.evaluate(values);
  } catch (error) {
    if (error instanceof SumOfPoints) {
      return { code: "expression-units", found: `"${shortened(text)}", two places on a scale added`, expected: "a difference to be added, in K or in an absolute unit of pressure, as in 22 degC + 5 K" };
    }
    return { code: "expression-units", found: `"${shortened(text)}", in which the units do not go together`, expected: "quantities of one kind to be added, and plain numbers in functions and exponents" };
  }
  return quantityFrom(result, scale) ?? { code: "expression-units", found: `"${shortened(text)}", which is no finite value of a kind that a cycle file uses`, expected: "a number, or a quantity such as a pressure, a temperature or a flow" };
}

function quantityFrom(result: unknown, scale: Quantity["scale"]): Quantity | undefined {
  if (typeof result === "number") return Number.isFinite(result) ? { value: result, kind: "fraction" } : undefined;
  const quantity = result as MathUnit;
  for (const [kind, unit] of Object.entries(SI_UNIT) as [Exclude<UnitKind, "fraction">, string][]) {
    if (!math.isUnit(quantity) || !kindUnit(kind, unit).equalBase(quantity)) continue;
    const value = quantity.toNumber(unit);
    if (!Number.isFinite(value)) return undefined;
    return scale === undefined || (kind !== "temperature" && kind !== "pressure") ? { value, kind } : { value, kind, scale };
  }
  return undefined;
}

const kindUnits = new Map<UnitKind, MathUnit>();
function kindUnit(kind: UnitKind, unit: string): MathUnit {
  const known = kindUnits.get(kind) ?? math.unit(1, unit);
  kindUnits.set(kind, known);
  return known;
}

function compile(text: string): Compiled | Complaint {
  try {
    const tree = parse(text);
    const names = new Set<string>();
    let gauge = false;
    const check = (node: MathNode, path: string | null): MathNode => {
      const scale = scaleUnit(node);
      if (scale === undefined) return checked(node, path, names);
      gauge ||= scale.unit.gauge === true;
      // What has been replaced is not looked into any more.
      return fromZero((node as OperatorNode).args[0].transform(check), scale.unit);
    };
    const arithmetic = tree.transform(check);
    return { tree, code: arithmetic.compile(), names: [...names], gauge };
  } catch (error) {
    if (error instanceof Refused) return error.complaint;
    throw error;
  }
}

function parse(text: string): MathNode {
  try {
    return math.parse(text);
  } catch (error) {
    const reason = error instanceof Error ? error.message.replace(/ \(char \d+\)$/, "") : "";
    throw new Refused({ code: "expression-syntax", found: `"${shortened(text)}", which cannot be read (${shortened(reason)})`, expected: "a value such as 8 bar, 62 % or p_high - 0.2 bar" });
  }
}

/** A number of a unit with a zero of its own, counted from absolute zero: 22 degC as (22 * 1 + 273.15) K. */
function fromZero(number: MathNode, { kind, factor, offset = 0, gauge }: Unit): MathNode {
  const { ConstantNode, OperatorNode, ParenthesisNode, SymbolNode } = math;
  const zero = gauge === true ? new SymbolNode(GAUGE_ZERO) : new ConstantNode(offset);
  const scaled = new OperatorNode("*", "multiply", [number, new ConstantNode(factor)]);
  const sum = new ParenthesisNode(new OperatorNode("+", "add", [scaled, zero]));
  return new OperatorNode("*", "multiply", [sum, new SymbolNode(kind === "pressure" ? "Pa" : "K")]);
}

/** A node that is arithmetic, with the minute told from the function min; anything else is refused. */
function checked(node: MathNode, path: string | null, names: Set<string>): MathNode {
  const refuse = (what: string, part?: string): never => {
    throw new Refused({ code: "expression-refused", found: what, expected: `numbers, units, names, + - * / ^ and ${FUNCTIONS.join(", ")}`, ...(part === undefined ? {} : { part }) });
  };
  if (math.isConstantNode(node)) return typeof node.value === "number" ? node : refuse(`the value ${shortened(String(node.value))}`);
  if (math.isParenthesisNode(node)) return node;
  if (math.isFunctionNode(node)) {
    const called: MathNode = node.fn;
    const name = math.isSymbolNode(called) ? called.name : String(called);
    return FUNCTIONS.includes(name) ? node : refuse(`a call of "${shortened(name)}"`, name);
  }
  if (math.isOperatorNode(node)) {
    return OPERATORS.has(node.op) ? node : refuse(`the operator "${node.op}"`);
  }
  if (!math.isSymbolNode(node)) return refuse(`"${shortened(String(node))}"`);
  if (path === "fn") return node;
  const { name } = node as SymbolNode;
  if (name === "min") return new math.SymbolNode(MINUTE);
  if (unitValues.has(name)) return node;
  if (Object.hasOwn(units, name)) return refuse(`"${name}" without a number before it`, name);
  if (FUNCTIONS.includes(name)) return refuse(`"${name}" without what it is to be taken of`, name);
  names.add(name);
  return node;
}

function unknown(name: string, scope: Scope): Complaint {
  const complaint = unknownName(name, scope.names());
  if (complaint.suggestion !== undefined) return complaint;
  return { ...complaint, ...suggested(nearest(name, [...unitValues.keys(), ...Object.keys(units).filter((unit) => /^\w+$/.test(unit))])) };
}
