import { isConstantNode, isFunctionNode, isOperatorNode, isParenthesisNode, isSymbolNode, type MathNode, type OperatorNode } from "mathjs";
import type { Quantity } from "./quantity.js";
import { units, type Unit } from "./units.js";

/**
 * What a part of an expression is: a bare number; a place on a scale with a zero of its own (22 degC, 7 barg, and what they are
 * shifted to); the difference of two such places; or anything else, such as 5 K, that may be either.
 */
type Role = "number" | "point" | "difference" | "either";

/** Two places on a scale added, which mean nothing: what zero would the sum have? */
export class SumOfPoints extends Error {}

/** The unit with a zero of its own, such as degC or barg, that a number is multiplied with here; undefined elsewhere. */
export function scaleUnit(node: MathNode): { readonly name: string; readonly unit: Unit } | undefined {
  if (!isOperatorNode(node) || (node as OperatorNode & { implicit: boolean }).implicit !== true) return undefined;
  const [, symbol] = node.args as MathNode[];
  if (!isSymbolNode(symbol) || !Object.hasOwn(units, symbol.name)) return undefined;
  const unit = units[symbol.name];
  return unit.offset === undefined && unit.gauge === undefined ? undefined : { name: symbol.name, unit };
}

/**
 * Whether an expression's value is a place on a scale or a difference.
 * @throws SumOfPoints
 */
export function scaleOf(node: MathNode, named: (name: string) => Quantity | undefined): Quantity["scale"] {
  const role = roleOf(node, named);
  return role === "point" || role === "difference" ? role : undefined;
}

function roleOf(node: MathNode, named: (name: string) => Quantity | undefined): Role {
  if (isConstantNode(node)) return "number";
  if (isParenthesisNode(node)) return roleOf(node.content, named);
  if (isSymbolNode(node)) {
    const quantity = named(node.name);
    const kind = quantity?.kind ?? (Object.hasOwn(units, node.name) ? units[node.name].kind : undefined);
    if (kind === "fraction") return "number";
    return quantity?.scale ?? "either";
  }
  if (isFunctionNode(node)) {
    const roles = node.args.map((each) => roleOf(each, named));
    return roles.find((role) => role === "point") ?? roles.find((role) => role === "difference") ?? roles[0] ?? "either";
  }
  if (!isOperatorNode(node)) return "either";
  if (scaleUnit(node) !== undefined) return "point";
  const [left, right] = (node.args as MathNode[]).map((each) => roleOf(each, named));
  if (right === undefined) return left;
  switch ((node as OperatorNode).op) {
    case "+":
      if (left === "point" && right === "point") throw new SumOfPoints();
      return left === "point" || right === "point" ? "point" : left === right ? left : "either";
    case "-":
      if (right === "point") return "difference";
      return left === "point" || left === right ? left : "either";
    case "*":
      return left === "number" ? right : right === "number" ? left : "either";
    case "/":
      return right === "number" ? left : "either";
    default:
      return left === "number" ? "number" : "either";
  }
}
