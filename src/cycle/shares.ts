import type { Stream } from "../blocks/stream.js";
import type { Placed } from "./placed.js";

/**
 * The share of the machine's flow in every stream in which it does not depend on the state of the gas: from the compressor's
 * inlet onwards, through blocks that keep it and splitters, as far as that goes.
 */
export function staticShares(blocks: readonly Placed[], compressorInlet: Stream): Map<Stream, number> {
  const shares = new Map<Stream, number>([[compressorInlet, 1]]);
  const set = (stream: Stream, share: number): boolean => !shares.has(stream) && shares.set(stream, share) !== undefined;
  for (let changed = true; changed; ) {
    changed = false;
    for (const { kind, ports } of blocks) {
      for (const { entry, inlet, outlet, branch } of ports) {
        const share = shares.get(inlet);
        if (share === undefined) continue;
        const { joint } = kind;
        if (joint === undefined || branch === undefined) {
          changed = set(outlet, share) || changed;
        } else if (joint.direction === "takes") {
          const joining = shares.get(branch);
          if (joining !== undefined) changed = set(outlet, share + joining) || changed;
        } else if (joint.share !== undefined) {
          const aside = joint.share(entry);
          changed = set(branch, share * aside) || changed;
          changed = set(outlet, share * (1 - aside)) || changed;
        }
      }
    }
  }
  return shares;
}
