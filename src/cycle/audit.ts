import type { Stream } from "../blocks/stream.js";
import type { EnergyFlows } from "../blocks/unit.js";
import { State } from "../fluids/state.js";
import type { Network, Placed } from "./network.js";

/** The first- and second-law accounts of a settled network. */
export interface Audit {
  /** Largest imbalance of any block over the largest energy flow. */
  readonly residual: number;
  /** The block whose balance is worst. */
  readonly worstBlock: string;
  /** Power, heat and enthalpy flows over the machine's boundary, summed, over the largest energy flow. */
  readonly energy: number;
  /** Exergy in less out less destroyed, over the exergy in. */
  readonly exergy: number;
  readonly destroyed: readonly { readonly block: string; readonly destroyed: number; readonly share: number }[];
  readonly flows: ReadonlyMap<string, EnergyFlows>;
  /** J/kg, exergy of a stream over the surroundings' state */
  exergyOf(stream: Stream): number;
}

/** Draws up the accounts of a settled network. */
export function audit(network: Network): Audit {
  const { blocks, setting, streams, inlet, definition } = network;
  const { fluid, surroundings } = setting;
  const ambient = surroundings.temperature;
  const dead = fluid.temperaturePressure(ambient, surroundings.pressure, new State());
  const stateOf = (stream: Stream): State => fluid.pressureEnthalpy(stream.pressure, stream.enthalpy, stream.state);
  const exergyOf = (stream: Stream): number =>
    stream.enthalpy - dead.enthalpy - ambient * (stateOf(stream).entropy - dead.entropy);

  const flows = new Map(blocks.map(({ unit }) => [unit.name, unit.energyFlows()]));
  let largest = 0;
  let residual = 0;
  let worstBlock = "";
  let energy = 0;
  let supplied = 0;
  let delivered = 0;
  const rows: { block: string; destroyed: number }[] = [];
  for (const { unit, ports } of blocks) {
    const { work, drive, heat } = flows.get(unit.name) as EnergyFlows;
    const heatIn = heat.reduce((sum, flow) => sum + flow.heat, 0);
    const gained = ports.reduce((sum, { inlet: from, outlet }) => sum + outlet.massFlow * outlet.enthalpy - from.massFlow * from.enthalpy, 0);
    const imbalance = Math.abs(work + heatIn - gained);
    largest = Math.max(largest, Math.abs(work), ...heat.map((flow) => Math.abs(flow.heat)), throughput(ports));
    energy += work + heatIn;
    if (imbalance > residual) {
      residual = imbalance;
      worstBlock = unit.name;
    }
    for (const flow of heat) {
      const exergy = flow.heat * (1 - ambient / flow.temperature);
      if (exergy > 0) supplied += exergy;
      else delivered -= exergy;
    }
    supplied += drive;
    rows.push({ block: unit.name, destroyed: ambient * entropyMade(ports, heat, stateOf) });
    // What the motor takes beyond the gas's work is lost in the drive; an expander's power, where nothing uses it, in its brake.
    const spilt = drive - work;
    if (Math.abs(spilt) > 0) rows.push({ block: `${unit.name} ${work < 0 ? "brake" : "drive"}`, destroyed: spilt });
  }
  if (definition.circuit === "open") {
    const exhaust = streams.at(-1) as Stream;
    energy += inlet.massFlow * inlet.enthalpy - exhaust.massFlow * exhaust.enthalpy;
    supplied += inlet.massFlow * exergyOf(inlet);
    rows.push({ block: "exhaust", destroyed: exhaust.massFlow * exergyOf(exhaust) });
  }
  const total = rows.reduce((sum, row) => sum + row.destroyed, 0);
  const scale = largest > 0 ? largest : 1;
  return {
    residual: residual / scale,
    worstBlock,
    energy: Math.abs(energy) / scale,
    exergy: Math.abs(supplied - delivered - total) / (supplied > 0 ? supplied : 1),
    destroyed: rows.map(({ block, destroyed }) => ({ block, destroyed, share: total > 0 ? destroyed / total : 0 })),
    flows,
    exergyOf,
  };
}

function throughput(ports: Placed["ports"]): number {
  return Math.max(...ports.map(({ inlet, outlet }) => Math.abs(outlet.massFlow * (outlet.enthalpy - inlet.enthalpy))));
}

/** W/K made in a block: entropy out less in, less what came with heat. */
function entropyMade(ports: Placed["ports"], heat: EnergyFlows["heat"], stateOf: (stream: Stream) => State): number {
  const carried = ports.reduce(
    (sum, { inlet, outlet }) => sum + outlet.massFlow * stateOf(outlet).entropy - inlet.massFlow * stateOf(inlet).entropy,
    0,
  );
  return heat.reduce((sum, flow) => sum - flow.heat / flow.temperature, carried);
}
