import type { Warning } from "./unit.js";

/** A warning where a stated heat leak would have to come into gas warmer than the surroundings. */
export function leakWarnings(block: string, leak: number, gasTemperature: number, surroundingsTemperature: number): Warning[] {
  if (leak === 0 || gasTemperature <= surroundingsTemperature) return [];
  return [
    {
      code: "leak-into-warm-gas",
      block,
      message: `the gas leaves at ${gasTemperature.toFixed(2)} K, warmer than the surroundings, from which no heat can leak into it: its heat-leak is on the safe side at best.`,
    },
  ];
}
