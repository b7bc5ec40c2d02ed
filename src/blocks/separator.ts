import type { BlockKind, Port, Setting } from "./kind.js";
import { flash, surely } from "./ports.js";
import type { Unit } from "./unit.js";

/** Splits a wet stream into its vapour, which goes on, and its liquid. */
export const separator: BlockKind = {
  kind: "separator",
  summary: "Splits a wet stream at equilibrium: the vapour goes on, the liquid leaves as product or down a branch.",
  keys: [{ type: "branch", name: "liquid", words: ["product"], required: true, help: "product, or the branch that the liquid goes down" }],
  alternatives: [],
  figures: [
    { name: "liquidFlow", label: "liquid", dimension: "mass flow" },
    { name: "liquidFraction", label: "share of the flow", dimension: "fraction" },
    { name: "temperature", label: "at", dimension: "temperature" },
  ],
  joint: { key: "liquid", direction: "gives" },
  pressureChange: "falls or stays",
  outletPressure: (_entry, inletPressure) => inletPressure,
  place: ([port], setting) => placeSeparator(surely(port), setting),
};

function placeSeparator({ entry, inlet, outlet, branch }: Port, { fluid }: Setting): Unit {
  const liquid = surely(branch);
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      const { vapourFraction } = flash(fluid, inlet);
      const { pressure } = inlet;
      if (Number.isNaN(vapourFraction)) {
        // Above the critical pressure there is nothing to separate.
        outlet.enthalpy = inlet.enthalpy;
        outlet.massFlow = inlet.massFlow;
        liquid.enthalpy = inlet.enthalpy;
        liquid.massFlow = 0;
        return;
      }
      const { liquidEnthalpy, vapourEnthalpy } = fluid.saturation(pressure);
      outlet.enthalpy = Math.max(inlet.enthalpy, vapourEnthalpy);
      liquid.enthalpy = Math.min(inlet.enthalpy, liquidEnthalpy);
      outlet.massFlow = inlet.massFlow * vapourFraction;
      liquid.massFlow = inlet.massFlow - outlet.massFlow;
    },
    energyFlows: () => ({ work: 0, drive: 0, heat: [] }),
    figures: () => ({
      liquidFlow: liquid.massFlow,
      liquidFraction: inlet.massFlow > 0 ? liquid.massFlow / inlet.massFlow : 0,
      temperature: flash(fluid, inlet).temperature,
    }),
  };
}
