import { isConstantNode, isFunctionNode, isOperatorNode, isParenthesisNode, isSymbolNode, type MathNode, type OperatorNode } from "mathjs/number";
import type { Quantity } from "./quantity.js";
import { units, type Unit } from "./units.js";
import { alike, DIMENSIONS, expressionUnits, product, type Dimensions } from "./vocabulary.js";

/** What a part of an expression measures, and whether it is a place on a scale or a difference of two. */
export interface Measured {
  readonly dimensions: Dimensions;
  readonly scale?: Quantity["scale"];
}

/** Units that do not go together. */
export class UnitsError extends Error {}
/** Two places on a scale added, which mean nothing: what zero would the sum have? */
export class SumOfPoints extends Error {}

const NUMBER: Measured = { dimensions: DIMENSIONS.fraction };

/** The unit with a zero of its own, such as degC or barg, that a number is multiplied with here; undefined elsewhere. */
export function scaleUnit(node: MathNode): Unit | undefined {
  if (!isOperatorNode(node) || (node as OperatorNode & { implicit: boolean }).implicit !== true) return undefined;
  const [, symbol] = node.args as MathNode[];
  if (!isSymbolNode(symbol) || !Object.hasOwn(units, symbol.name)) return undefined;
  const unit = units[symbol.name];
  return unit.offset === undefined && unit.gauge === undefined ? undefined : unit;
}

/**
 * What an expression measures.
 *
 * @param named the quantities of its names
 * @param numberAt the value of a part that has to be known for that: an exponent
 * @throws UnitsError, SumOfPoints
 */
export function measure(node: MathNode, named: ReadonlyMap<string, Quantity>, numberAt: (node: MathNode) => number): Measured {
  const parts = (nodes: readonly MathNode[]): Measured[] => nodes.map((each) => measure(each, named, numberAt));
  if (isConstantNode(node)) return NUMBER;
  if (isParenthesisNode(node)) return measure(node.content, named, numberAt);
  if (isSymbolNode(node)) {
    const quantity = named.get(node.name);
    if (quantity !== undefined) return { dimensions: DIMENSIONS[quantity.kind], scale: quantity.scale };
    // A function's own name is no value; what is left is a unit or a plain constant.
    return { dimensions: (expressionUnits.get(node.name) ?? NUMBER).dimensions };
  }
  if (isFunctionNode(node)) return functionOf(node.fn.name, parts(node.args));
  if (!isOperatorNode(node)) throw new UnitsError();
  const args = node.args as MathNode[];
  const scale = scaleUnit(node);
  if (scale !== undefined) {
    plain(measure(args[0], named, numberAt));
    return { dimensions: DIMENSIONS[scale.kind], scale: "point" };
  }
  const [left, right] = parts(args);
  if (right === undefined) return left;
  switch ((node as OperatorNode).op) {
    case "+":
    case "-":
      return sum(left, right, (node as OperatorNode).op);
    case "*":
      return { dimensions: product([left.dimensions, 1], [right.dimensions, 1]), scale: isPlain(left) ? right.scale : isPlain(right) ? left.scale : undefined };
    case "/":
      return { dimensions: product([left.dimensions, 1], [right.dimensions, -1]), scale: isPlain(right) ? left.scale : undefined };
    default:
      plain(right);
      return isPlain(left) ? NUMBER : { dimensions: product([left.dimensions, numberAt(args[1])]) };
  }
}

function functionOf(name: string, args: readonly Measured[]): Measured {
  const [first = NUMBER] = args;
  if (name === "sqrt") return { dimensions: product([first.dimensions, 0.5]) };
  if (name === "exp" || name === "log") {
    args.forEach(plain);
    return NUMBER;
  }
  for (const each of args) if (!alike(first.dimensions, each.dimensions)) throw new UnitsError();
  return { dimensions: first.dimensions, scale: args.find(({ scale }) => scale === "point")?.scale ?? first.scale };
}

function sum(left: Measured, right: Measured, operator: "+" | "-"): Measured {
  const { dimensions } = left;
  if (!alike(dimensions, right.dimensions)) throw new UnitsError();
  const points = [left, right].filter(({ scale }) => scale === "point").length;
  if (operator === "+" && points === 2) throw new SumOfPoints();
  if (operator === "-" && right.scale === "point") return { dimensions, scale: "difference" };
  return { dimensions, scale: points > 0 ? "point" : left.scale === right.scale ? left.scale : undefined };
}

function isPlain({ dimensions }: Measured): boolean {
  return alike(dimensions, DIMENSIONS.fraction);
}

function plain(measured: Measured): void {
  if (!isPlain(measured)) throw new UnitsError();
}
