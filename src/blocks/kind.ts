import type { Fluid } from "../fluids/fluid.js";
import type { BlockDefinition } from "./definition.js";
import type { Alternative, Figure, Key } from "./keys.js";
import type { Passage, Solved } from "./passage.js";
import type { Problem } from "./problem.js";
import type { Stream } from "./stream.js";
import type { Unit } from "./unit.js";

/** What every block may know of the machine around it. */
export interface Setting {
  readonly fluid: Fluid;
  readonly surroundings: { /** K */ readonly temperature: number; /** Pa */ readonly pressure: number };
  /** W that expanders deliver to the shaft of the block named, as of their last evaluation. */
  shaftPowerInto(name: string): number;
}

/** The streams that one entry of the loop stands between. */
export interface Port {
  readonly entry: BlockDefinition;
  readonly inlet: Stream;
  readonly outlet: Stream;
  /** The second stream that a kind with a `branch` gives or takes. */
  readonly branch?: Stream;
}

/** How a kind joins a branch to the line that it stands in. */
export interface Joint {
  /** The key that names the branch. */
  readonly key: string;
  /** Whether the branch begins or ends here. */
  readonly direction: "gives" | "takes";
  /** Share of the flow that goes down the branch; undefined where it follows from the state of the gas. */
  share?(entry: BlockDefinition): number;
}

/**
 * A block kind: one record says everything that the rest of the program knows about it. The cycle-file reader checks
 * against the keys, the help and the docs are printed from them, the pressure plan asks `outletPressure`, and the
 * solver works on what `place` returns. Nothing outside asks which kind it has before it.
 */
export interface BlockKind {
  /** As written in the cycle file: "expander". */
  readonly kind: string;
  /** One sentence for help and docs. */
  readonly summary: string;
  /** The sides under which the block stands in the loop, once each; left out for a block that stands once. */
  readonly sides?: readonly [string, string];
  readonly keys: readonly Key[];
  /** Groups of keys of which one must be given. */
  readonly alternatives: readonly Alternative[];
  /** What it reports of a solved block, in the order of printing. */
  readonly figures: readonly Figure[];
  /** The key whose value decides whether the machine liquefies: an expander's efficiency. */
  readonly liquefactionKey?: string;
  /** The branch that begins or ends at the block. */
  readonly joint?: Joint;
  /** True where the gas leaves the machine here, at the end of a branch. */
  readonly leaves?: true;
  /** The key that names the block driven, and whether a block may be driven instead of having its outlet pressure given. */
  readonly drivesKey?: string;
  readonly mayFloat?: true;
  /** True where the outlet's state is fixed whatever comes in, so that no feedback passes through the block. */
  fixesOutlet?(entry: BlockDefinition): boolean;
  /** Checks between the keys of a block, over all its entries; ranges and alternatives are checked from the records. */
  check?(entries: readonly BlockDefinition[], setting: Pick<Setting, "surroundings">): Problem[];
  /**
   * Pressure (Pa) behind an entry, from the pressure before it; undefined where it needs the inlet's and has none.
   */
  outletPressure(entry: BlockDefinition, inletPressure: number | undefined): number | undefined;
  /** Whether the pressure may rise, must fall, or may only fall or stay, through the block. */
  readonly pressureChange: "rises" | "falls" | "falls or stays";
  /** The states that the gas passes inside, for what may condense or freeze out there; left out, inlet and outlet only. */
  passage?(solved: Solved): Passage;
  /** The block with its numbers ready, between its streams; ports in the order of `sides`. */
  place(ports: readonly Port[], setting: Setting): Unit;
}
