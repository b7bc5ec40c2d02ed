import type { CycleDefinition } from "../cycle/definition.js";
import type { Override } from "./override.js";
import { evaluateExpression } from "./expression.js";
import { openCycleFile } from "./open.js";

/** How a text is read. */
export interface ReadOptions {
  /** The name that messages give the text. */
  readonly file?: string;
  /** Values put in place of those written: `{ address: "T1.efficiency", value: "55 %" }`; a number is in SI units. */
  readonly set?: readonly Override[];
}

/**
 * The checked definition that a cycle file's text means, in SI units.
 *
 * @throws InputError with every fault at once, each with line and column
 *
 * @example
 * readCycle(text, { set: [{ address: "let.p_high", value: "9 bar" }] });
 */
export function readCycle(text: string, { file = "cycle", set = [] }: ReadOptions = {}): CycleDefinition {
  return openCycleFile(text, file, evaluateExpression).define(set);
}
