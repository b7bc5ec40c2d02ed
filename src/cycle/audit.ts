import type { Stream } from "../blocks/stream.js";
import type { EnergyFlows } from "../blocks/unit.js";
import { State } from "../fluids/state.js";
import type { Network } from "./network.js";
import { streamsIn, streamsOut } from "./order.js";
import type { Placed } from "./placed.js";

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
  /** W carried away by products */
  readonly productExergy: number;
  /** J/kg, exergy of a stream over the surroundings' state */
  exergyOf(stream: Stream): number;
}

/** Draws up the accounts of a settled network. */
export function audit(network: Network): Audit {
  const { blocks, setting, comingIn, products, exhaust } = network;
  const { fluid, surroundings } = setting;
  const ambient = surroundings.temperature;
  const dead = fluid.temperaturePressure(ambient, surroundings.pressure, new State());
  const stateOf = (stream: Stream): State => fluid.pressureEnthalpy(stream.pressure, stream.enthalpy, stream.state);
  const exergyOf = (stream: Stream): number =>
    stream.enthalpy - dead.enthalpy - ambient * (stateOf(stream).entropy - dead.entropy);

  const entropyOf = (stream: Stream): number => stateOf(stream).entropy;
  const flows = new Map(blocks.map(({ unit }) => [unit.name, unit.energyFlows()]));
  let largest = 0;
  let residual = 0;
  let worstBlock = "";
  let energy = 0;
  let supplied = 0;
  let useful = 0;
  let productExergy = 0;
  const rows: { block: string; destroyed: number }[] = [];
  for (const { unit, kind, ports } of blocks) {
    const { work, drive, heat, recovered = 0, delivered = 0, lostIn } = flows.get(unit.name) as EnergyFlows;
    const heatIn = heat.reduce((sum, flow) => sum + flow.heat, 0);
    const into = ports.flatMap((port) => streamsIn(kind, port));
    const out = ports.flatMap((port) => streamsOut(kind, port));
    const imbalance = Math.abs(work + heatIn + carried(into, enthalpyOf) - carried(out, enthalpyOf));
    largest = Math.max(largest, Math.abs(work), ...heat.map((flow) => Math.abs(flow.heat)), throughput(ports));
    energy += work + heatIn;
    if (imbalance > residual) {
      residual = imbalance;
      worstBlock = unit.name;
    }
    for (const flow of heat) {
      const exergy = flow.heat * (1 - ambient / flow.temperature);
      if (exergy > 0) supplied += exergy;
      else useful -= exergy;
    }
    supplied += drive;
    const made = carried(out, entropyOf) - carried(into, entropyOf) - heat.reduce((sum, flow) => sum + flow.heat / flow.temperature, 0);
    // Power that is bought or done by the gas and reaches neither gas nor shaft.
    const spilt = drive + recovered - work - delivered;
    const own = ambient * made + (lostIn === undefined ? spilt : 0);
    rows.push({ block: unit.name, destroyed: own });
    if (lostIn !== undefined && Math.abs(spilt) > 0) rows.push({ block: `${unit.name} ${lostIn}`, destroyed: spilt });
  }
  for (const stream of comingIn) {
    energy += stream.massFlow * stream.enthalpy;
    supplied += stream.massFlow * exergyOf(stream);
  }
  for (const stream of products) {
    energy -= stream.massFlow * stream.enthalpy;
    useful += stream.massFlow * exergyOf(stream);
    productExergy += stream.massFlow * exergyOf(stream);
  }
  if (exhaust !== undefined) {
    energy -= exhaust.massFlow * exhaust.enthalpy;
    rows.push({ block: "exhaust", destroyed: exhaust.massFlow * exergyOf(exhaust) });
  }
  const total = rows.reduce((sum, row) => sum + row.destroyed, 0);
  const scale = largest > 0 ? largest : 1;
  return {
    residual: residual / scale,
    worstBlock,
    energy: Math.abs(energy) / scale,
    exergy: Math.abs(supplied - useful - total) / (supplied > 0 ? supplied : 1),
    destroyed: rows.map(({ block, destroyed }) => ({ block, destroyed, share: total > 0 ? destroyed / total : 0 })),
    flows,
    productExergy,
    exergyOf,
  };
}

function throughput(ports: Placed["ports"]): number {
  return Math.max(...ports.map(({ inlet, outlet }) => Math.abs(outlet.massFlow * (outlet.enthalpy - inlet.enthalpy))));
}

function enthalpyOf({ enthalpy }: Stream): number {
  return enthalpy;
}

/** What streams carry of a property that each has per mass; a stream without flow carries none. */
function carried(streams: readonly Stream[], property: (stream: Stream) => number): number {
  return streams.reduce((sum, stream) => (stream.massFlow > 0 ? sum + stream.massFlow * property(stream) : sum), 0);
}
