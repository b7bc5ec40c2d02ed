import type { EvalFunction, MathNode, OperatorNode, SymbolNode } from "mathjs/number";
import { shortened, type Complaint } from "./document.js";
import { math } from "./mathjs.js";
import { measure, scaleUnit, SumOfPoints, UnitsError, type Measured } from "./measure.js";
import { nearest, suggested } from "./nearest.js";
import type { Quantity } from "./quantity.js";
import { units, type Unit, type UnitKind } from "./units.js";
import { unknownName, type Scope } from "./values.js";
import { alike, DIMENSIONS, expressionUnits, FUNCTIONS } from "./vocabulary.js";

const OPERATORS = new Set(["+", "-", "*", "/", "^"]);
/** The minute within an expression, where min is the function; like the next, a name that no user can write. */
const MINUTE = "the minute";
/** The surroundings' pressure within an expression. */
const GAUGE_ZERO = "the gauge zero";
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

/** What units and constants are in SI. */
const constants: ReadonlyMap<string, number> = new Map([
  ["pi", Math.PI],
  ...Array.from(expressionUnits, ([name, { factor }]): [string, number] => [name === "min" ? MINUTE : name, factor]),
]);

/**
 * Evaluates an expression of numbers, units and names: mathjs reads it and does the arithmetic, of SI values, and what is measured is
 * followed beside it. An expression cannot define, assign, index, or reach an object. Temperatures and gauge pressures are counted
 * from absolute zero before anything is done to them.
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
  const values = new Map(constants);
  for (const name of names) {
    const quantity = scope.get(name);
    if (quantity === null) return null;
    if (quantity === undefined) return unknown(name, scope);
    quantities.set(name, quantity);
    values.set(name, quantity.value);
  }
  if (gauge) {
    const zero = scope.surroundingsPressure();
    if (Number.isNaN(zero)) return null;
    values.set(GAUGE_ZERO, zero);
  }
  const complaint = (found: string, expected: string): Complaint => ({ code: "expression-units", found: `"${shortened(text)}", ${found}`, expected });
  try {
    const measured = measure(tree, quantities, (node) => Number(node.compile().evaluate(values)));
    const value: unknown = code.evaluate(values);
    if (!Number.isFinite(value)) return complaint("which has no finite value", "a finite number");
    return quantityOf(value as number, measured) ?? complaint("which is none of the quantities that a cycle file uses", "a number, or a quantity such as a pressure, a temperature or a flow");
  } catch (error) {
    if (error instanceof SumOfPoints) return complaint("two places on a scale added", "a difference to be added, in K or in an absolute unit of pressure, as in 22 degC + 5 K");
    if (error instanceof UnitsError) return complaint("in which the units do not go together", "quantities of one kind to be added, and plain numbers in functions and exponents");
    return { code: "expression-syntax", found: `"${shortened(text)}", which cannot be evaluated`, expected: "each function of as many values as it takes" };
  }
}

function quantityOf(value: number, { dimensions, scale }: Measured): Quantity | undefined {
  for (const [kind, own] of Object.entries(DIMENSIONS) as [UnitKind, Measured["dimensions"]][]) {
    if (alike(dimensions, own)) return scale === undefined || kind === "fraction" ? { value, kind } : { value, kind, scale };
  }
  return undefined;
}

function compile(text: string): Compiled | Complaint {
  try {
    const tree = parse(text);
    const names = new Set<string>();
    let gauge = false;
    const check = (node: MathNode, path: string | null): MathNode => {
      const scale = scaleUnit(node);
      if (scale === undefined) return checked(node, path, names);
      gauge ||= scale.gauge === true;
      // What has been replaced is not looked into any more.
      return fromZero((node as OperatorNode).args[0].transform(check), scale);
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

/** A number of a unit with a zero of its own, counted from absolute zero: 22 degC as (22 * 1 + 273.15). */
function fromZero(number: MathNode, { factor, offset = 0, gauge }: Unit): MathNode {
  const { ConstantNode, OperatorNode, ParenthesisNode, SymbolNode } = math;
  const zero = gauge === true ? new SymbolNode(GAUGE_ZERO) : new ConstantNode(offset);
  const scaled = new OperatorNode("*", "multiply", [number, new ConstantNode(factor)]);
  return new ParenthesisNode(new OperatorNode("+", "add", [scaled, zero]));
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
  if (math.isOperatorNode(node)) return OPERATORS.has(node.op) ? node : refuse(`the operator "${node.op}"`);
  if (!math.isSymbolNode(node)) return refuse(`"${shortened(String(node))}"`);
  if (path === "fn") return node;
  const { name } = node as SymbolNode;
  if (name === "min") return new math.SymbolNode(MINUTE);
  if (constants.has(name)) return node;
  if (Object.hasOwn(units, name)) return refuse(`"${name}" without a number before it`, name);
  if (FUNCTIONS.includes(name)) return refuse(`"${name}" without what it is to be taken of`, name);
  names.add(name);
  return node;
}

function unknown(name: string, scope: Scope): Complaint {
  const complaint = unknownName(name, scope.names());
  if (complaint.suggestion !== undefined) return complaint;
  return { ...complaint, ...suggested(nearest(name, [...expressionUnits.keys(), ...Object.keys(units).filter((unit) => /^\w+$/.test(unit))])) };
}
