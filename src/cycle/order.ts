import type { Port } from "../blocks/kind.js";
import type { Stream } from "../blocks/stream.js";
import type { Placed } from "./placed.js";

/** A stream that has to be assumed before the block that gives it is evaluated. */
export interface Tear {
  readonly stream: Stream;
  /** Whether its mass flow has to be assumed too. */
  readonly flow: boolean;
}

/** The streams that come into a block at a port. */
export function streamsIn(kind: Placed["kind"], { inlet, branch }: Port): Stream[] {
  return branch !== undefined && kind.joint?.direction === "takes" ? [inlet, branch] : [inlet];
}

/** The streams that leave a block at a port. */
export function streamsOut(kind: Placed["kind"], { outlet, branch }: Port): Stream[] {
  return branch !== undefined && kind.joint?.direction === "gives" ? [outlet, branch] : [outlet];
}

/**
 * An order in which every block is evaluated after the blocks that feed it. Where feedback leaves none, the inlets that
 * are still unknown of the first block that the gas has reached are assumed: these are the tears.
 *
 * @param intake known from the start, in an open circuit
 * @param assumed a stream to be assumed in any case: the inlet at which a volume flow is measured
 * @param shares the streams whose flow is known from the start
 */
export function evaluationOrder(
  blocks: readonly Placed[],
  intake: Stream | undefined,
  assumed: Stream | undefined,
  shares: ReadonlyMap<Stream, number>,
): { order: Placed[]; tears: Tear[] } {
  const known = new Set<Stream>();
  const tears: Tear[] = [];
  const order: Placed[] = [];
  const waiting = new Set(blocks);
  const assume = (stream: Stream): void => {
    known.add(stream);
    tears.push({ stream, flow: !shares.has(stream) });
  };
  const done = (block: Placed): void => {
    for (const port of block.ports) for (const stream of streamsOut(block.kind, port)) known.add(stream);
    order.push(block);
    waiting.delete(block);
  };
  if (intake !== undefined) known.add(intake);
  if (assumed !== undefined && !known.has(assumed)) assume(assumed);
  // The fresh gas of a make-up is known whatever comes.
  for (const { kind, ports } of blocks) {
    for (const { branch } of ports) if (branch !== undefined && kind.joint?.direction === "takes" && !isGiven(branch, blocks)) known.add(branch);
  }
  for (const block of blocks) {
    if (block.ports.every(({ entry, outlet }) => block.kind.fixesOutlet?.(entry) === true && shares.has(outlet))) done(block);
  }
  while (waiting.size > 0) {
    const candidates = [...waiting];
    const incoming = (block: Placed): Stream[] => block.ports.flatMap((port) => streamsIn(block.kind, port));
    const missing = (block: Placed): Stream[] => incoming(block).filter((stream) => !known.has(stream));
    const next =
      candidates.find((block) => missing(block).length === 0) ??
      candidates.find((block) => missing(block).length < incoming(block).length) ??
      candidates[0];
    for (const stream of missing(next)) assume(stream);
    done(next);
  }
  return { order, tears };
}

function isGiven(stream: Stream, blocks: readonly Placed[]): boolean {
  return blocks.some(({ kind, ports }) => ports.some((port) => streamsOut(kind, port).includes(stream)));
}
