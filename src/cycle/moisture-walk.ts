import type { BlockDefinition } from "../blocks/definition.js";
import { plainPassage, type Passage } from "../blocks/passage.js";
import { blockKind } from "../blocks/registry.js";
import type { Contents } from "../fluids/moist-air.js";
import { collect, type Collected } from "./collection.js";
import type { CycleDefinition } from "./definition.js";
import { branchGiven, branchTaken } from "./lines.js";
import type { Moisture } from "./moisture-result.js";
import type { BlockResult, Station, SteadyState } from "./result.js";

/** How fresh air comes in. */
export interface Supply {
  readonly source: Moisture["source"];
  readonly fresh: Contents;
  /** Fresh air over the compressor's flow. */
  readonly share: number;
}

/** The gas passing one entry of the loop or of a branch. */
export interface Visit {
  readonly entry: BlockDefinition;
  /** As the station behind it is called. */
  readonly after: string;
  /** kg/s */
  readonly massFlow: number;
  readonly passage: Passage;
  readonly collected: Collected;
}

export interface Followed {
  readonly visits: readonly Visit[];
  /** Contents behind each station, by its `after`. */
  readonly at: ReadonlyMap<string, Contents>;
}

/** Rounds after which what circulates is no longer followed; each freezes the gas dry, so that two or three settle it. */
const MOST_ROUNDS = 100;
/** Change of what returns, against what the fresh air brings, at which it is settled. */
const SETTLED = 1e-12;

/**
 * Follows the contents of the air around the machine until what returns to the compressor no longer changes. A closed circuit's
 * first fill comes through its compressor once.
 */
export function followContents(definition: CycleDefinition, state: SteadyState, supply: Supply): Followed {
  const machine = new Machine(definition, state, supply);
  let returning = supply.source === "intake" ? supply.fresh : { water: 0, carbonDioxide: 0 };
  for (let round = 0; ; round++) {
    const followed = machine.round(returning);
    const next = supply.source === "intake" ? supply.fresh : followed.end;
    const change = Math.max(
      Math.abs(next.water - returning.water) / (supply.fresh.water || 1),
      Math.abs(next.carbonDioxide - returning.carbonDioxide) / (supply.fresh.carbonDioxide || 1),
    );
    // The second round knows what comes back from branches that leave behind where they return.
    if ((round > 0 && change <= SETTLED) || round === MOST_ROUNDS) return followed;
    returning = next;
  }
}

class Machine {
  readonly #definition: CycleDefinition;
  readonly #stations: ReadonlyMap<string, Station>;
  readonly #blocks: ReadonlyMap<string, BlockResult>;
  readonly #supply: Supply;
  readonly #compressor: BlockDefinition | undefined;
  /** Contents and flow at the end of each branch, as of its last visit. */
  readonly #ends = new Map<string, { readonly contents: Contents; readonly massFlow: number }>();

  constructor(definition: CycleDefinition, { stations, blocks }: SteadyState, supply: Supply) {
    this.#definition = definition;
    this.#stations = new Map(stations.map((station) => [station.after, station]));
    this.#blocks = new Map(blocks.map((block) => [block.name, block]));
    this.#supply = supply;
    this.#compressor = definition.loop.find((entry) => blockKind(entry.kind)?.pressureChange === "rises");
  }

  /** Once through the loop and every branch, from the contents at the loop's start. */
  round(start: Contents): Followed & { readonly end: Contents } {
    const visits: Visit[] = [];
    const at = new Map<string, Contents>();
    const { loop } = this.#definition;
    const first = this.#supply.source === "intake" ? "intake" : labelOf(loop.at(-1));
    at.set("intake", start);
    const end = this.#line(loop, start, this.#station(first), visits, at);
    return { visits, at, end };
  }

  #line(entries: readonly BlockDefinition[], start: Contents, from: Station | undefined, visits: Visit[], at: Map<string, Contents>): Contents {
    let contents = start;
    let inlet = from;
    for (const entry of entries) {
      const after = labelOf(entry);
      const outlet = this.#station(after);
      if (outlet === undefined) return contents;
      if (entry === this.#compressor && this.#supply.source !== "intake") {
        contents = this.#supplied(contents);
        inlet = this.#station("make-up") ?? inlet;
        at.set("make-up", contents);
      }
      contents = this.#joined(entry, contents, outlet);
      const kind = blockKind(entry.kind);
      const solved = { entry, inlet: inlet ?? outlet, outlet, figures: this.#blocks.get(entry.name) ?? {} };
      const passage = kind?.passage?.(solved) ?? plainPassage(solved);
      const collected = collect(passage, contents);
      contents = collected.contents;
      visits.push({ entry, after, massFlow: outlet.massFlow, passage, collected });
      at.set(after, contents);
      inlet = outlet;

      const aside = this.#station(`${after} ${kind?.joint?.key}`);
      if (aside === undefined) continue;
      at.set(aside.after, contents);
      const branch = branchGiven(entry);
      const line = branch === undefined ? undefined : this.#definition.branches[branch];
      if (branch === undefined || line === undefined) continue;
      const massFlow = this.#station(labelOf(line.at(-1)))?.massFlow ?? 0;
      this.#ends.set(branch, { contents: this.#line(line, contents, aside, visits, at), massFlow });
    }
    return contents;
  }

  /** What the compressor takes in: what returns, and the fresh air with it. */
  #supplied(returning: Contents): Contents {
    const { source, fresh, share } = this.#supply;
    return source === "first fill" ? fresh : mix(returning, fresh, share);
  }

  /** Behind a mixer: what came along the line, and what the branch brings. */
  #joined(entry: BlockDefinition, contents: Contents, outlet: Station): Contents {
    const branch = branchTaken(entry);
    const joining = branch === undefined ? undefined : this.#ends.get(branch);
    return joining === undefined || !(outlet.massFlow > 0) ? contents : mix(contents, joining.contents, joining.massFlow / outlet.massFlow);
  }

  #station(after: string | undefined): Station | undefined {
    return after === undefined ? undefined : this.#stations.get(after);
  }
}

/** Two streams together, the second making up a share of the whole. */
function mix(one: Contents, other: Contents, share: number): Contents {
  const mean = (a: number, b: number): number => (1 - share) * a + share * b;
  return { water: mean(one.water, other.water), carbonDioxide: mean(one.carbonDioxide, other.carbonDioxide) };
}

/** What the station behind an entry is called. */
function labelOf(entry: BlockDefinition): string;
function labelOf(entry: BlockDefinition | undefined): string | undefined;
function labelOf(entry: BlockDefinition | undefined): string | undefined {
  if (entry === undefined) return undefined;
  return entry.side === undefined ? entry.name : `${entry.name} ${entry.side}`;
}
