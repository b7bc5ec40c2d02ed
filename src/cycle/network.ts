import type { BlockDefinition } from "../blocks/definition.js";
import type { BlockKind, Port, Setting } from "../blocks/kind.js";
import { blockKind } from "../blocks/registry.js";
import { Stream } from "../blocks/stream.js";
import type { Unit } from "../blocks/unit.js";
import { fluid as fluidNamed } from "../fluids/registry.js";
import { State } from "../fluids/state.js";
import type { CycleDefinition, Flow } from "./definition.js";
import { planPressures } from "./plan.js";

/** A block in the network, between its streams. */
export interface Placed {
  readonly unit: Unit;
  readonly kind: BlockKind;
  readonly ports: readonly Port[];
}


/** The machine as streams and blocks, pressures and flows planned, in an order in which it can be evaluated. */
export interface Network {
  readonly definition: CycleDefinition;
  readonly setting: Setting;
  /** The stream behind each entry of the loop, in its order. */
  readonly streams: readonly Stream[];
  /** The stream at the compressor's inlet of a closed circuit, or an open one's intake. */
  readonly inlet: Stream;
  /** Blocks in the order of the loop. */
  readonly blocks: readonly Placed[];
  /** Blocks in the order of evaluation. */
  readonly order: readonly Placed[];
  readonly tears: readonly Stream[];
  /** Sets the mass flow of every stream, once the compressor's inlet has an enthalpy. */
  setFlows(): void;
}

/**
 * Builds the network of a checked definition.
 * @throws Error when the definition has problems that the reader should have reported
 */
export function buildNetwork(definition: CycleDefinition): Network {
  const { loop, surroundings, circuit } = definition;
  const fluid = fluidNamed(definition.fluid);
  const setting: Setting = { fluid, surroundings };
  const plan = planPressures(definition);
  if (plan.problems[0] !== undefined) throw new Error(`unchecked definition: ${plan.problems[0].found}`);

  const streams = plan.behind.map((pressure) => streamAt(pressure));
  const open = circuit === "open";
  const intake = open ? streamAt(surroundings.pressure) : (streams.at(-1) as Stream);
  if (open) {
    intake.enthalpy = fluid.temperaturePressure(surroundings.temperature, surroundings.pressure, intake.state).enthalpy;
  }
  const portOf = (entry: BlockDefinition): Port => {
    const index = loop.indexOf(entry);
    return { entry, inlet: index === 0 ? intake : (streams[index - 1] as Stream), outlet: streams[index] as Stream };
  };
  const blocks = gather(loop).map((entries): Placed => {
    const kind = blockKind(entries[0]?.kind ?? "") as BlockKind;
    const ports = bySide(kind, entries).map(portOf);
    return { unit: kind.place(ports, setting), kind, ports };
  });
  const known = new Set<Stream>(open ? [intake] : []);
  const compressorInlet = open ? intake : inletOfFirstCompressor(loop, portOf);
  const tears: Stream[] = [];
  if (definition.flow.kind === "inlet volume" && !known.has(compressorInlet)) {
    tears.push(compressorInlet);
    known.add(compressorInlet);
  }
  const order = evaluationOrder(blocks, known, tears);
  const scratch = new State();
  const setFlows = (): void => {
    const massFlow = massFlowOf(definition.flow, fluid, compressorInlet, scratch);
    intake.massFlow = massFlow;
    for (const stream of streams) stream.massFlow = massFlow;
  };
  return { definition, setting, streams, inlet: intake, blocks, order, tears, setFlows };
}

function streamAt(pressure: number): Stream {
  const stream = new Stream();
  stream.pressure = pressure;
  return stream;
}

/** The entries of each block together, blocks in the order in which the gas first meets them. */
function gather(loop: readonly BlockDefinition[]): BlockDefinition[][] {
  const blocks = new Map<string, BlockDefinition[]>();
  for (const entry of loop) {
    const together = blocks.get(entry.name);
    if (together === undefined) blocks.set(entry.name, [entry]);
    else together.push(entry);
  }
  return [...blocks.values()];
}

function bySide(kind: BlockKind, entries: readonly BlockDefinition[]): readonly BlockDefinition[] {
  if (kind.sides === undefined) return entries;
  return kind.sides.flatMap((side) => entries.filter((entry) => entry.side === side));
}

/** The flow is stated at the inlet of the first block that raises the pressure. */
function inletOfFirstCompressor(loop: readonly BlockDefinition[], portOf: (entry: BlockDefinition) => Port): Stream {
  const first = loop.find((entry) => blockKind(entry.kind)?.pressureChange === "rises") ?? (loop[0] as BlockDefinition);
  return portOf(first).inlet;
}

/**
 * An order in which every block is evaluated after the blocks that feed it. Where feedback leaves none, the inlets that
 * are still unknown of the first block that the gas has reached are assumed: these are the tears.
 */
function evaluationOrder(blocks: readonly Placed[], known: Set<Stream>, tears: Stream[]): Placed[] {
  const order: Placed[] = [];
  const waiting = new Set(blocks);
  for (const block of blocks) {
    if (block.ports.every(({ entry }) => block.kind.fixesOutlet?.(entry) === true)) {
      for (const { outlet } of block.ports) known.add(outlet);
      order.push(block);
      waiting.delete(block);
    }
  }
  while (waiting.size > 0) {
    const candidates = [...waiting];
    const missing = (block: Placed): Stream[] => block.ports.map(({ inlet }) => inlet).filter((stream) => !known.has(stream));
    const next =
      candidates.find((block) => missing(block).length === 0) ??
      candidates.find((block) => missing(block).length < block.ports.length) ??
      (candidates[0] as Placed);
    for (const stream of missing(next)) {
      tears.push(stream);
      known.add(stream);
    }
    for (const { outlet } of next.ports) known.add(outlet);
    order.push(next);
    waiting.delete(next);
  }
  return order;
}

function massFlowOf(flow: Flow, fluid: Setting["fluid"], inlet: Stream, scratch: State): number {
  switch (flow.kind) {
    case "mass":
      return flow.value;
    case "molar":
      return flow.value * fluid.molarMass;
    case "reference volume":
      return flow.value * fluid.temperaturePressure(flow.temperature, flow.pressure, scratch).density;
    case "inlet volume":
      return flow.value * fluid.pressureEnthalpy(inlet.pressure, inlet.enthalpy, scratch).density;
  }
}
