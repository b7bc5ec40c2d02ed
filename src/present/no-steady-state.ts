import type { NoSteadyState } from "../cycle/failure.js";
import { wrap } from "./wrap.js";

/** Why there is no steady state and what to change, for a person. */
export function noSteadyState({ block, quantity, reason, advice }: NoSteadyState): string {
  const where = block === null ? quantity : `${block}, ${quantity}`;
  return [`No steady state: ${where}`, wrap(capital(reason), "  "), wrap(`What to change: ${advice}`, "  ")].join("\n");
}

function capital(sentence: string): string {
  return sentence.charAt(0).toUpperCase() + sentence.slice(1);
}
