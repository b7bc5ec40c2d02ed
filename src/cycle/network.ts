import type { BlockDefinition } from "../blocks/definition.js";
import type { BlockKind, Port, Setting } from "../blocks/kind.js";
import { blockKind } from "../blocks/registry.js";
import { Stream } from "../blocks/stream.js";
import type { Unit } from "../blocks/unit.js";
import { fluid as fluidNamed } from "../fluids/registry.js";
import { State } from "../fluids/state.js";
import type { CycleDefinition, Flow } from "./definition.js";
import { branchGiven, branchTaken, givesProduct, linesOf } from "./lines.js";
import { makeUp } from "./make-up.js";
import { evaluationOrder, type Tear } from "./order.js";
import type { Placed } from "./placed.js";
import { floatingBlocks, planPressures } from "./plan.js";
import { staticShares } from "./shares.js";

/** A stream with what the gas has just left, for the state-point table. */
export interface Labelled {
  readonly after: string;
  readonly stream: Stream;
  /** True for what leaves its line at a joint: a separator's liquid says nothing of how near the rest is to condensing. */
  readonly aside?: true;
}

/** A block whose outlet pressure follows from the power that drives it. */
export interface Floating {
  readonly name: string;
  readonly placed: Placed;
}

/** The machine as streams and blocks, pressures and flows planned, in an order in which it can be evaluated. */
export interface Network {
  readonly definition: CycleDefinition;
  readonly setting: Setting;
  /** Every stream but an open circuit's intake, as the gas passes them: the loop's, then the branches'. */
  readonly labelled: readonly Labelled[];
  /** The stream at the compressor's inlet of a closed circuit, or an open one's intake. */
  readonly inlet: Stream;
  /** What comes in from outside: an open circuit's intake, a closed one's make-up. */
  readonly comingIn: readonly Stream[];
  /** What leaves as product. */
  readonly products: readonly Stream[];
  /** An open circuit's exhaust. */
  readonly exhaust: Stream | undefined;
  /** Blocks as the gas meets them. */
  readonly blocks: readonly Placed[];
  /** Blocks in the order of evaluation. */
  readonly order: readonly Placed[];
  readonly tears: readonly Tear[];
  readonly floating: readonly Floating[];
  /** Sets the mass flows that follow from the machine's own, once the compressor's inlet has an enthalpy. */
  setFlows(): void;
  /** Sets the pressures for the floating blocks' ratios, in their order. */
  setPressures(ratios: readonly number[]): void;
}

/**
 * Builds the network of a checked definition.
 * @throws Error when the definition has problems that the reader should have reported
 */
export function buildNetwork(definition: CycleDefinition): Network {
  const { surroundings, loop } = definition;
  const fluid = fluidNamed(definition.fluid);
  const plan = planPressures(definition);
  if (plan.problems[0] !== undefined) throw new Error(`unchecked definition: ${plan.problems[0].found}`);

  const lines = linesOf(definition);
  const entries = lines.flatMap((line) => line.entries);
  const behind = new Map(entries.map((entry) => [entry, streamAt(plan.behind.get(entry) as number)]));
  const ofEntry = (entry: BlockDefinition): Stream => behind.get(entry) as Stream;
  /** Streams that leave their line at a joint. */
  const aside = new Map<BlockDefinition, Stream>();
  for (const entry of entries) {
    if (branchGiven(entry) !== undefined || givesProduct(entry)) aside.set(entry, streamAt(ofEntry(entry).pressure));
  }
  const products = entries.flatMap((entry) => {
    if (blockKind(entry.kind)?.leaves === true) return [ofEntry(entry)];
    return givesProduct(entry) ? [aside.get(entry) as Stream] : [];
  });
  const open = definition.circuit === "open";
  const compressor = entries.find((entry) => blockKind(entry.kind)?.pressureChange === "rises") ?? loop[0];
  const remade = !open && products.length > 0;
  const suction = remade ? streamAt(plan.before.get(compressor) as number) : undefined;
  const intake = open ? streamAt(surroundings.pressure) : undefined;

  const branchStart = new Map<string, Stream>();
  for (const entry of entries) {
    const name = branchGiven(entry);
    if (name !== undefined) branchStart.set(name, aside.get(entry) as Stream);
  }
  const inletOf = new Map<BlockDefinition, Stream>();
  for (const { branch, entries: line } of lines) {
    line.forEach((entry, index) => {
      const start = branch === undefined ? (intake ?? ofEntry(line.at(-1) as BlockDefinition)) : (branchStart.get(branch) as Stream);
      inletOf.set(entry, index === 0 ? start : ofEntry(line[index - 1]));
    });
  }
  const returning = inletOf.get(compressor) as Stream;
  if (suction !== undefined) inletOf.set(compressor, suction);

  const portOf = (entry: BlockDefinition): Port => {
    const taken = branchTaken(entry);
    const joining = taken === undefined ? aside.get(entry) : ofEntry(definition.branches[taken].at(-1) as BlockDefinition);
    return { entry, inlet: inletOf.get(entry) as Stream, outlet: ofEntry(entry), ...(joining === undefined ? {} : { branch: joining }) };
  };
  const byName = new Map<string, Unit[]>();
  const setting: Setting = {
    fluid,
    surroundings,
    shaftPowerInto: (name) => (byName.get(name) ?? []).reduce((sum, unit) => sum + (unit.shaftPower?.() ?? 0), 0),
  };
  const blocks = gather(entries).map((together): Placed => {
    const kind = blockKind(together[0].kind) as BlockKind;
    const placed = { unit: kind.place(bySide(kind, together).map(portOf), setting), kind, ports: bySide(kind, together).map(portOf) };
    const driven = kind.drivesKey === undefined ? undefined : together[0].values[kind.drivesKey];
    if (typeof driven === "string") byName.set(driven, [...(byName.get(driven) ?? []), placed.unit]);
    return placed;
  });
  const comingIn: Stream[] = [];
  if (suction !== undefined) {
    const fresh = streamAt(suction.pressure);
    comingIn.push(fresh);
    blocks.push(makeUp({ inlet: returning, outlet: suction, branch: fresh }, setting));
  }
  if (intake !== undefined) {
    intake.enthalpy = fluid.temperaturePressure(surroundings.temperature, surroundings.pressure, intake.state).enthalpy;
    comingIn.push(intake);
  }
  const inlet = intake ?? suction ?? returning;
  const compressorInlet = inletOf.get(compressor) as Stream;
  const shares = staticShares(blocks, compressorInlet);
  const volumeFlow = definition.flow.kind === "inlet volume" && intake !== compressorInlet;
  const { order, tears } = evaluationOrder(blocks, intake, volumeFlow ? compressorInlet : undefined, shares);
  const scratch = new State();
  const floating = floatingBlocks(definition).map(({ name }) => ({ name, placed: blocks.find(({ unit }) => unit.name === name) as Placed }));
  const streams = [...shares.keys()];
  const parts = [...shares.values()];

  return {
    definition,
    setting,
    labelled: labelsOf(lines.flatMap((line) => line.entries), ofEntry, aside, suction),
    inlet,
    comingIn,
    products,
    exhaust: open ? ofEntry(loop.at(-1) as BlockDefinition) : undefined,
    blocks,
    order,
    tears,
    floating,
    setFlows() {
      const massFlow = massFlowOf(definition.flow, fluid, compressorInlet, scratch);
      for (let i = 0; i < streams.length; i++) streams[i].massFlow = massFlow * parts[i];
    },
    setPressures(ratios) {
      if (floating.length === 0) return;
      const planned = planPressures(definition, new Map(floating.map(({ name }, i) => [name, ratios[i]])));
      for (const entry of entries) {
        const pressure = planned.behind.get(entry) as number;
        ofEntry(entry).pressure = pressure;
        const leaving = aside.get(entry);
        if (leaving !== undefined) leaving.pressure = pressure;
      }
      const before = planned.before.get(compressor) as number;
      if (suction !== undefined) for (const stream of [suction, ...comingIn]) stream.pressure = before;
    },
  };
}

function streamAt(pressure: number): Stream {
  const stream = new Stream();
  stream.pressure = pressure;
  return stream;
}

/** The entries of each block together, blocks in the order in which the gas first meets them. */
function gather(entries: readonly BlockDefinition[]): BlockDefinition[][] {
  const blocks = new Map<string, BlockDefinition[]>();
  for (const entry of entries) {
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

function labelsOf(
  entries: readonly BlockDefinition[],
  ofEntry: (entry: BlockDefinition) => Stream,
  aside: ReadonlyMap<BlockDefinition, Stream>,
  suction: Stream | undefined,
): Labelled[] {
  const labels = entries.flatMap((entry) => {
    const after = entry.side === undefined ? entry.name : `${entry.name} ${entry.side}`;
    const leaving = aside.get(entry);
    const joint = blockKind(entry.kind)?.joint;
    const label = { after, stream: ofEntry(entry) };
    if (leaving === undefined || joint === undefined) return [label];
    return [label, { after: `${entry.name} ${joint.key}`, stream: leaving, aside: true as const }];
  });
  return suction === undefined ? labels : [...labels, { after: "make-up", stream: suction }];
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
