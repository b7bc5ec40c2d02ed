import type { Caution } from "../cycle/result.js";
import { wrap } from "./wrap.js";

/** Cautions as paragraphs under their titles. */
export function cautionsText(cautions: readonly Caution[]): string {
  return cautions.map(({ title, text }) => `${wrap(title)}\n${wrap(text, "  ")}`).join("\n");
}
