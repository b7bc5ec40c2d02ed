import { required } from "./definition.js";
import type { BlockKind, Port, Setting } from "./kind.js";
import { flash, surely } from "./ports.js";
import type { Unit } from "./unit.js";

/** Expands at constant enthalpy. */
export const valve: BlockKind = {
  kind: "valve",
  summary: "Expands the gas at constant enthalpy (Joule-Thomson).",
  keys: [
    {
      type: "number",
      name: "outlet-pressure",
      dimension: "pressure",
      range: { lowest: 0, open: "lowest" },
      help: "pressure behind the valve",
      required: true,
    },
  ],
  alternatives: [],
  figures: [
    { name: "pressureRatio", label: "pressure ratio", dimension: "none" },
    { name: "temperatureChange", label: "temperature change", dimension: "temperature difference" },
    { name: "outletVapourFraction", label: "vapour fraction behind it", dimension: "fraction" },
  ],
  pressureChange: "falls",
  outletPressure: (entry) => required(entry, "outlet-pressure"),
  place: ([port], setting) => placeValve(surely(port), setting),
};

function placeValve({ entry, inlet, outlet }: Port, { fluid }: Setting): Unit {
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      outlet.enthalpy = inlet.enthalpy;
    },
    energyFlows: () => ({ work: 0, drive: 0, heat: [] }),
    figures() {
      const before = flash(fluid, inlet);
      const after = flash(fluid, outlet);
      return {
        pressureRatio: inlet.pressure / outlet.pressure,
        temperatureChange: after.temperature - before.temperature,
        outletVapourFraction: Number.isNaN(after.vapourFraction) ? null : after.vapourFraction,
      };
    },
  };
}
