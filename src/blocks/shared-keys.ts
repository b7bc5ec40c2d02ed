import { given, type BlockDefinition } from "./definition.js";
import type { NumberKey } from "./keys.js";

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
