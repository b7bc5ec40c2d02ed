import { given } from "./definition.js";
import { leakWarnings } from "./leak.js";
import type { BlockKind, Port, Setting } from "./kind.js";
import { heatLeak, pressureAfterDrop, pressureDrop } from "./shared-keys.js";
import { flash, surely } from "./ports.js";
import type { Unit } from "./unit.js";

/** A pipe or a section of the cold box. */
export const line: BlockKind = {
  kind: "line",
  summary: "A pipe or a section of the cold box: loses pressure and takes up heat.",
  keys: [pressureDrop, heatLeak],
  alternatives: [],
  figures: [
    { name: "heatLeak", label: "heat leak", dimension: "power" },
    { name: "pressureDrop", label: "pressure drop", dimension: "pressure difference" },
  ],
  pressureChange: "falls or stays",
  outletPressure: pressureAfterDrop,
  place: ([port], setting) => placeLine(surely(port), setting),
};

function placeLine({ entry, inlet, outlet }: Port, { fluid, surroundings }: Setting): Unit {
  const stated = given(entry, "heat-leak") ?? 0;
  // Without flow, in a branch for liquid while there is none, nothing carries a leak away.
  const leak = (): number => (inlet.massFlow > 0 ? stated : 0);
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      outlet.enthalpy = inlet.massFlow > 0 ? inlet.enthalpy + stated / inlet.massFlow : inlet.enthalpy;
    },
    energyFlows: () => ({ work: 0, drive: 0, heat: [{ heat: leak(), temperature: surroundings.temperature }] }),
    figures: () => ({ heatLeak: leak(), pressureDrop: inlet.pressure - outlet.pressure }),
    warnings: () => leakWarnings(entry.name, leak(), flash(fluid, outlet).temperature, surroundings.temperature),
  };
}
