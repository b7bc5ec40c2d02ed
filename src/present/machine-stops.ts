import type { BlockDefinition } from "../blocks/definition.js";
import { blockKind } from "../blocks/registry.js";
import type { CycleDefinition } from "../cycle/definition.js";
import { branchGiven, branchTaken, givesProduct, linesOf } from "../cycle/lines.js";
import type { Station } from "../cycle/result.js";

/** What the gas passes on its way: a block's entry, or where a line comes from and goes to. */
export interface Stop {
  /** Its name, and beneath it its kind or the branch that begins here. */
  readonly lines: readonly [string, string];
  /** False for the two ends of a line, which are no blocks. */
  readonly boxed: boolean;
  /** The station behind it. */
  readonly station?: Station;
  /** The block's name where this is one side of it. */
  readonly sideOf?: string;
  /** True for the side of the gas on its way back. */
  readonly back?: boolean;
}

/** A line of the machine as it is drawn. */
export interface DrawnLine {
  readonly stops: readonly Stop[];
  /** True where the gas comes back to the first stop from the last. */
  readonly closed: boolean;
}

/** Letters of a name beyond which it loses its middle. */
const LONGEST_NAME = 16;

/** The loop and its branches as lines of stops; a closed loop begins at its first compressor, wherever the file does. */
export function drawnLines(definition: CycleDefinition, stations: readonly Station[]): DrawnLine[] {
  const behind = new Map(stations.map((station) => [station.after, station]));
  const lines = linesOf(definition);
  const entries = lines.flatMap((line) => line.entries);
  const givers = new Map(entries.map((entry) => [branchGiven(entry), entry]));
  const takers = new Map(entries.map((entry) => [branchTaken(entry), entry]));
  const suction = entries.find(risesPressure) ?? definition.loop[0];
  const madeUp: Stop[] = behind.has("make-up") ? [{ lines: ["make-up", "fresh gas"], boxed: true, station: behind.get("make-up") }] : [];
  const stopsOf = (entry: BlockDefinition): Stop[] => [...(entry === suction ? madeUp : []), stopOf(entry, behind)];

  const drawn = lines.map(({ branch, entries: line }): DrawnLine => {
    if (branch === undefined) return loopOf(definition, line, stopsOf, behind);
    const giver = givers.get(branch);
    const taker = takers.get(branch);
    const start = giver === undefined ? [] : [asideOf(giver, shortened(branch), behind)];
    const end = endOf(taker === undefined ? "out" : `to ${shortened(taker.name)}`);
    return { stops: [...start, ...line.flatMap(stopsOf), end], closed: false };
  });
  const draws = entries.filter(givesProduct).map((entry): DrawnLine => {
    const key = blockKind(entry.kind)?.joint?.key ?? "";
    return { stops: [asideOf(entry, key, behind), endOf("product")], closed: false };
  });
  return [...drawn, ...draws];
}

function loopOf(
  { circuit }: CycleDefinition,
  line: readonly BlockDefinition[],
  stopsOf: (entry: BlockDefinition) => Stop[],
  behind: ReadonlyMap<string, Station>,
): DrawnLine {
  if (circuit === "open") {
    const intake: Stop = { lines: ["intake", ""], boxed: false, station: behind.get("intake") };
    return { stops: [intake, ...line.flatMap(stopsOf), endOf("exhaust")], closed: false };
  }
  const first = Math.max(0, line.findIndex(risesPressure));
  const stops = [...line.slice(first + 1), ...line.slice(0, first + 1)].flatMap(stopsOf);
  // What is made up stands before the compressor: it joins the gas that comes back.
  return { stops: [...stops.slice(-1), ...stops.slice(0, -1)], closed: true };
}

function risesPressure({ kind }: BlockDefinition): boolean {
  return blockKind(kind)?.pressureChange === "rises";
}

function stopOf({ kind, name, side }: BlockDefinition, behind: ReadonlyMap<string, Station>): Stop {
  const title = shortened(name);
  if (side === undefined) return { lines: [title, kind], boxed: true, station: behind.get(name) };
  const back = side === blockKind(kind)?.sides?.[1];
  return { lines: [`${title} ${side}`, kind], boxed: true, station: behind.get(`${name} ${side}`), sideOf: name, back };
}

/** Where a branch begins. */
function asideOf({ kind, name }: BlockDefinition, what: string, behind: ReadonlyMap<string, Station>): Stop {
  const station = behind.get(`${name} ${blockKind(kind)?.joint?.key}`);
  return { lines: [`from ${shortened(name)}`, what], boxed: false, station };
}

function endOf(text: string): Stop {
  return { lines: [text, ""], boxed: false };
}

/** A long name without its middle: names that are alike differ at one of their ends. */
function shortened(name: string): string {
  if (name.length <= LONGEST_NAME) return name;
  const kept = LONGEST_NAME - 1;
  return `${name.slice(0, Math.ceil(kept / 2))}…${name.slice(-Math.floor(kept / 2))}`;
}
