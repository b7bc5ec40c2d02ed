import type { Warning } from "./unit.js";

/** K by which gas may be warmer than the surroundings and count as being as warm. */
const AS_WARM = 0.05;

/** A warning where a stated heat leak would have to come into gas warmer than the surroundings. */
export function leakWarnings(block: string, leak: number, gasTemperature: number, surroundingsTemperature: number): Warning[] {
  if (leak === 0 || gasTemperature <= surroundingsTemperature + AS_WARM) return [];
  return [
    {
      code: "leak-into-warm-gas",
      block,
      message: `the gas leaves at ${gasTemperature.toFixed(2)} K, warmer than the surroundings, from which no heat can leak into it: its heat-leak is on the safe side at best.`,
    },
  ];
}
