import type { BlockKind, Port } from "../blocks/kind.js";
import type { Unit } from "../blocks/unit.js";

/** A block in the network, between its streams. */
export interface Placed {
  readonly unit: Unit;
  readonly kind: BlockKind;
  readonly ports: readonly Port[];
}
