import type { BlockKind, Port } from "./kind.js";
import { surely } from "./ports.js";
import type { Unit } from "./unit.js";

/** Ends a branch that leaves the machine. */
export const product: BlockKind = {
  kind: "product",
  summary: "Ends a branch: what comes here leaves the machine as product, and is made up at the compressor.",
  keys: [],
  alternatives: [],
  figures: [{ name: "productFlow", label: "product", dimension: "mass flow" }],
  leaves: true,
  pressureChange: "falls or stays",
  outletPressure: (_entry, inletPressure) => inletPressure,
  place: ([port]) => placeProduct(surely(port)),
};

function placeProduct({ entry, inlet, outlet }: Port): Unit {
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      outlet.enthalpy = inlet.enthalpy;
    },
    energyFlows: () => ({ work: 0, drive: 0, heat: [] }),
    figures: () => ({ productFlow: outlet.massFlow }),
  };
}
