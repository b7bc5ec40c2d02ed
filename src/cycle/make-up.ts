import type { BlockKind, Port, Setting } from "../blocks/kind.js";
import { State } from "../fluids/state.js";
import type { Placed } from "./placed.js";

/** What is drawn as product comes back at the compressor's suction, at the surroundings' temperature. */
const kind: BlockKind = {
  kind: "make-up",
  summary: "Replaces, at the compressor's suction, what leaves as product.",
  keys: [],
  alternatives: [],
  figures: [{ name: "makeUpFlow", label: "make-up", dimension: "mass flow" }],
  joint: { key: "make-up", direction: "takes" },
  pressureChange: "falls or stays",
  outletPressure: (_entry, inletPressure) => inletPressure,
  place: () => {
    throw new Error("a make-up is placed by the network itself");
  },
};

/** The make-up between the returning stream and the compressor's inlet, whose flow is the machine's own. */
export function makeUp(between: Omit<Port, "entry">, { fluid, surroundings }: Setting): Placed {
  const port: Port = { ...between, entry: { kind: kind.kind, name: kind.kind, values: {} } };
  const { inlet, outlet } = port;
  const fresh = between.branch as NonNullable<Port["branch"]>;
  const scratch = new State();
  return {
    kind,
    ports: [port],
    unit: {
      name: kind.kind,
      kind: kind.kind,
      evaluate() {
        fresh.enthalpy = fluid.temperaturePressure(surroundings.temperature, fresh.pressure, scratch).enthalpy;
        fresh.massFlow = outlet.massFlow - inlet.massFlow;
        outlet.enthalpy = (inlet.massFlow * inlet.enthalpy + fresh.massFlow * fresh.enthalpy) / outlet.massFlow;
      },
      energyFlows: () => ({ work: 0, drive: 0, heat: [] }),
      figures: () => ({ makeUpFlow: fresh.massFlow }),
    },
  };
}
