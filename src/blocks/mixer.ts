import type { BlockKind, Port } from "./kind.js";
import { surely } from "./ports.js";
import type { Unit } from "./unit.js";

/** Takes a branch back into the line. */
export const mixer: BlockKind = {
  kind: "mixer",
  summary: "Takes a branch back into the line; the pressures of the two must agree within 0.5 %.",
  keys: [{ type: "branch", name: "branch", words: [], required: true, help: "the branch that comes back" }],
  alternatives: [],
  figures: [{ name: "branchFlow", label: "flow out of the branch", dimension: "mass flow" }],
  joint: { key: "branch", direction: "takes" },
  pressureChange: "falls or stays",
  outletPressure: (_entry, inletPressure) => inletPressure,
  place: ([port]) => placeMixer(surely(port)),
};

function placeMixer({ entry, inlet, outlet, branch }: Port): Unit {
  const joining = surely(branch);
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      const massFlow = inlet.massFlow + joining.massFlow;
      outlet.massFlow = massFlow;
      outlet.enthalpy =
        massFlow > 0 ? (inlet.massFlow * inlet.enthalpy + joining.massFlow * joining.enthalpy) / massFlow : inlet.enthalpy;
    },
    energyFlows: () => ({ work: 0, drive: 0, heat: [] }),
    figures: () => ({ branchFlow: joining.massFlow }),
  };
}
