import { required } from "./definition.js";
import type { BlockKind, Port } from "./kind.js";
import { surely } from "./ports.js";
import type { Unit } from "./unit.js";

/** Sends a share of the flow down a branch. */
export const splitter: BlockKind = {
  kind: "splitter",
  summary: "Sends a share of the flow down a branch.",
  keys: [
    { type: "branch", name: "branch", words: [], required: true, help: "the branch that the share goes down" },
    {
      type: "number",
      name: "fraction",
      dimension: "fraction",
      range: { lowest: 0, highest: 1, open: "both" },
      help: "share of the flow that goes down the branch",
      required: true,
    },
  ],
  alternatives: [],
  figures: [{ name: "branchFlow", label: "flow down the branch", dimension: "mass flow" }],
  joint: { key: "branch", direction: "gives", share: (entry) => required(entry, "fraction") },
  pressureChange: "falls or stays",
  outletPressure: (_entry, inletPressure) => inletPressure,
  place: ([port]) => placeSplitter(surely(port)),
};

function placeSplitter({ entry, inlet, outlet, branch }: Port): Unit {
  const fraction = required(entry, "fraction");
  const aside = surely(branch);
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      outlet.enthalpy = inlet.enthalpy;
      aside.enthalpy = inlet.enthalpy;
      aside.massFlow = inlet.massFlow * fraction;
      outlet.massFlow = inlet.massFlow - aside.massFlow;
    },
    energyFlows: () => ({ work: 0, drive: 0, heat: [] }),
    figures: () => ({ branchFlow: aside.massFlow }),
  };
}
