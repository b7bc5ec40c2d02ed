import { given, type BlockDefinition } from "./definition.js";
import type { NumberKey } from "./keys.js";
import type { Problem } from "./problem.js";

/** Pressure lost between a block's inlet and outlet. */
export const pressureDrop: NumberKey = {
  type: "number",
  name: "pressure-drop",
  dimension: "pressure difference",
  range: { lowest: 0 },
  help: "pressure lost on the way through",
  default: 0,
};

/** Heat that comes in through the insulation. */
export const heatLeak: NumberKey = {
  type: "number",
  name: "heat-leak",
  dimension: "power",
  range: { lowest: 0 },
  help: "heat that comes in through the insulation",
  default: 0,
};

/** A key for an efficiency: more than 0, at most 100 %. */
export function efficiencyKey(name: string, help: string, more: Partial<NumberKey> = {}): NumberKey {
  return { type: "number", name, dimension: "fraction", range: { lowest: 0, highest: 1, open: "lowest" }, help, ...more };
}

/** The pressure behind a block that loses its `pressure-drop`; undefined where the pressure before is not known. */
export function pressureAfterDrop(entry: BlockDefinition, inletPressure: number | undefined): number | undefined {
  return inletPressure === undefined ? undefined : inletPressure - (given(entry, "pressure-drop") ?? 0);
}

/** The pressure behind a block, where it may be given as a ratio instead. */
export const outletPressure: NumberKey = {
  type: "number",
  name: "outlet-pressure",
  dimension: "pressure",
  range: { lowest: 0, open: "lowest" },
  help: "pressure behind the last stage",
  alternative: "pressure",
};

/** A pressure ratio in place of the outlet pressure. */
export function pressureRatio(help: string): NumberKey {
  return { type: "number", name: "pressure-ratio", dimension: "fraction", range: { lowest: 1, open: "lowest" }, help, alternative: "pressure" };
}

/** How many stages of equal pressure ratio there are. */
export const stages: NumberKey = {
  type: "number",
  name: "stages",
  dimension: "count",
  range: { lowest: 1, highest: 20 },
  help: "stages of equal pressure ratio",
  default: 1,
};

/** A problem where a count of stages is no whole number. */
export function stagesProblems(entry: BlockDefinition): Problem[] {
  const count = given(entry, "stages") ?? 1;
  if (count === Math.round(count)) return [];
  return [{ code: "not-whole", entry, key: "stages", found: `${count}`, expected: "a whole number" }];
}

/** The temperature at which the gas leaves a block. */
export function outletTemperature(help: string, more: Partial<NumberKey> = {}): NumberKey {
  return { type: "number", name: "outlet-temperature", dimension: "temperature", range: { lowest: 0, open: "lowest" }, help, ...more };
}
