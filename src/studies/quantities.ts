import type { Dimension } from "../blocks/keys.js";
import { blockKind } from "../blocks/registry.js";
import type { CycleDefinition } from "../cycle/definition.js";
import type { SteadyState } from "../cycle/result.js";
import type { SolveOptions } from "../cycle/solve.js";
import { InputError } from "../cyclefile/errors.js";
import { nearest } from "../cyclefile/nearest.js";
import { stationQuantities } from "./station-quantities.js";

/** What a result's number measures: a key's dimension, a mass flow, or nothing ("none"). */
export type ResultDimension = Dimension | "mass flow" | "none";

/** What a solution has to include beyond the steady state itself, each of which takes its time. */
export type Needs = Pick<SolveOptions, "threshold" | "composition">;

/** A number of a solved machine that can be tabulated, or asked for in a condition. */
export interface ResultQuantity {
  /** kebab-case: "cold-end.temperature" */
  readonly name: string;
  readonly dimension: ResultDimension;
  readonly help: string;
  /** Left out, nothing beyond the steady state. */
  readonly needs?: Needs;
  /** SI; null where the machine has no such number */
  get(result: SteadyState): number | null;
  /** Why there is no such number, where the machine itself can say. */
  missing?(result: SteadyState): string | null;
}

/** The numbers that every machine has, in the order in which help lists them. */
export const resultQuantities: readonly ResultQuantity[] = [
  { name: "cold-end.temperature", dimension: "temperature", help: "temperature of the coldest station", get: ({ coldEnd }) => coldEnd.temperature },
  { name: "capacity", dimension: "power", help: "heat that the loads take up", get: ({ refrigeration }) => refrigeration.capacity },
  { name: "net-power", dimension: "power", help: "all power bought from outside", get: ({ power }) => power.net },
  { name: "compression-power", dimension: "power", help: "power that compressors put into the gas", get: ({ power }) => power.compression },
  { name: "expansion-power", dimension: "power", help: "power that expanders take out of the gas", get: ({ power }) => power.expansion },
  { name: "cop", dimension: "none", help: "capacity over net power", get: ({ performance }) => performance.cop },
  { name: "carnot-cop", dimension: "none", help: "the same of a reversible refrigerator", get: ({ performance }) => performance.carnotCop },
  { name: "second-law-efficiency", dimension: "fraction", help: "COP over that of a reversible refrigerator", get: ({ performance }) => performance.secondLawEfficiency },
  { name: "liquid.fraction", dimension: "fraction", help: "liquid over the whole flow", get: ({ liquid }) => liquid?.fractionOfFlow ?? 0 },
  { name: "liquid.mass-flow", dimension: "mass flow", help: "flow of liquid", get: ({ liquid }) => liquid?.massFlow ?? 0 },
  { name: "liquefaction.margin", dimension: "specific enthalpy", help: "enthalpy over the dew point's where it is smallest; below zero liquid forms", get: ({ liquefaction }) => liquefaction.margin },
  {
    name: "liquefaction.required",
    dimension: "fraction",
    help: "smallest efficiency of every expander at which liquid begins to form",
    needs: { threshold: true },
    get: ({ liquefaction }) => liquefaction.required,
    missing: ({ liquefaction }) => liquefaction.reason,
  },
  { name: "mass-flow", dimension: "mass flow", help: "flow at the compressor's inlet", get: ({ massFlow }) => massFlow },
];

/** All that a number of results need together. */
export function needsOf(quantities: readonly ResultQuantity[]): Needs {
  return Object.assign({}, ...quantities.map(({ needs }) => needs)) as Needs;
}

/** Figures that are no single number. */
const NO_NUMBER = new Set<string>(["text", "profile", "temperature list", "none list"]);

/** The numbers that a machine's blocks report of themselves: NAME.figure. */
export function blockQuantities({ loop, branches }: Pick<CycleDefinition, "loop" | "branches">): ResultQuantity[] {
  const found = new Map<string, ResultQuantity>();
  for (const { name, kind } of [...loop, ...Object.values(branches).flat()]) {
    for (const figure of blockKind(kind)?.figures ?? []) {
      if (NO_NUMBER.has(figure.dimension)) continue;
      const address = `${name}.${kebab(figure.name)}`;
      found.set(address, {
        name: address,
        dimension: figure.dimension as ResultDimension,
        help: `${figure.label} of ${name}`,
        get: ({ blocks }) => {
          const value = blocks.find((block) => block.name === name)?.[figure.name];
          return typeof value === "number" ? value : null;
        },
      });
    }
  }
  return [...found.values()];
}

/**
 * The quantity of a name: one that every machine has, NAME.figure with the figure as the JSON result or kebab-case writes it, or
 * station-N.figure with the number of the state-point table.
 * @throws InputError with the nearest name
 */
export function resultQuantity(text: string, definition: CycleDefinition): ResultQuantity {
  const name = text.replace(/^station\s+(?=\d)/, "station-");
  const own = [...blockQuantities(definition), ...(name.startsWith("station") ? stationQuantities(definition) : [])];
  const all = [...resultQuantities, ...own];
  const exact = all.find((quantity) => quantity.name === name) ?? all.find((quantity) => quantity.name === kebabAfterDot(name));
  if (exact !== undefined) return exact;
  const [block = ""] = name.split(".");
  const ofBlock = own.filter((quantity) => quantity.name.startsWith(`${block}.`));
  const expected = ofBlock.length > 0 ? ofBlock : [...resultQuantities, { name: "NAME.figure" }, { name: "station-N.figure" }];
  const suggestion = nearest(name, all.map((quantity) => quantity.name));
  throw new InputError([
    {
      code: "unknown-quantity",
      place: name,
      line: 0,
      column: 0,
      found: "no result of that name",
      expected: expected.map((quantity) => quantity.name).join(", "),
      ...(suggestion === undefined ? {} : { suggestion }),
    },
  ]);
}

function kebab(name: string): string {
  return name.replaceAll(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`);
}

/** A block's name keeps its capitals; the figure behind it loses them. */
function kebabAfterDot(name: string): string {
  const dot = name.indexOf(".");
  return dot < 0 ? name : name.slice(0, dot) + kebab(name.slice(dot));
}
