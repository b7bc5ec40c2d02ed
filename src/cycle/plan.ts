import { given, type BlockDefinition } from "../blocks/definition.js";
import type { Problem } from "../blocks/problem.js";
import { blockKind } from "../blocks/registry.js";
import { fluid as fluidNamed } from "../fluids/registry.js";
import { waterVapourPressure } from "../fluids/water.js";
import type { CycleDefinition } from "./definition.js";
import { branchGiven, branchTaken, linesOf } from "./lines.js";
import { topologyProblems } from "./topology.js";

/** Pressures before and behind every entry of the loop and the branches, Pa. */
export interface PressurePlan {
  readonly before: ReadonlyMap<BlockDefinition, number>;
  readonly behind: ReadonlyMap<BlockDefinition, number>;
  readonly problems: readonly Problem[];
}

/** Pressure ratio of each block whose outlet pressure follows from the power that drives it. */
export type FloatingRatios = ReadonlyMap<string, number>;

/** Share; two pressures that agree to this are one: a pressure typed twice with six digits. */
const SAME_PRESSURE = 1e-6;
/** Share; pressures that meet in a mixer may differ by this. */
const MIXING_TOLERANCE = 5e-3;
/** K up to which water's vapour pressure is known well below its critical point. */
const HOTTEST_HUMID = 600;
/** Ratio assumed for a floating block where none is known yet. */
const ASSUMED_RATIO = 1.2;

/** What is wrong with a definition as a machine, in so far as it shows without solving. */
export function planProblems(definition: CycleDefinition): Problem[] {
  const topology = topologyProblems(definition);
  if (topology.length > 0) return [...temperatureProblems(definition), ...topology];
  return [...temperatureProblems(definition), ...planPressures(definition).problems];
}

/** The blocks whose outlet pressure is not given: an expander's power has to decide it. */
export function floatingBlocks(definition: CycleDefinition): BlockDefinition[] {
  return linesOf(definition).flatMap(({ entries }) =>
    entries.filter((entry) => blockKind(entry.kind)?.mayFloat === true && given(entry, "outlet-pressure") === undefined && given(entry, "pressure-ratio") === undefined),
  );
}

/**
 * Follows the pressure through the machine: from the surroundings in an open circuit, from the first block that fixes its
 * outlet in a closed one; then down the branches.
 */
export function planPressures(definition: CycleDefinition, ratios: FloatingRatios = new Map()): PressurePlan {
  const { surroundings, circuit, loop } = definition;
  const before = new Map<BlockDefinition, number>();
  const behind = new Map<BlockDefinition, number>();
  const open = circuit === "open";
  const floating = new Set(floatingBlocks(definition));
  const outletPressure = (entry: BlockDefinition, inlet: number | undefined): number | undefined => {
    if (floating.has(entry)) return inlet === undefined ? undefined : inlet * (ratios.get(entry.name) ?? ASSUMED_RATIO);
    return blockKind(entry.kind)?.outletPressure(entry, inlet);
  };
  const follow = (entries: readonly BlockDefinition[], inlet: number): number => {
    let pressure = inlet;
    for (const entry of entries) {
      before.set(entry, pressure);
      pressure = outletPressure(entry, Number.isNaN(pressure) ? undefined : pressure) ?? NaN;
      behind.set(entry, pressure);
    }
    return pressure;
  };
  const start = open ? 0 : loop.findIndex((entry) => outletPressure(entry, undefined) !== undefined);
  if (start < 0) {
    const expected = "one block at least with an outlet-pressure: a closed circuit's pressure level is otherwise free";
    return { before, behind, problems: [{ code: "no-pressure-fixed", key: "loop", found: "pressure ratios and drops only", expected }] };
  }
  const end = follow([...loop.slice(start), ...loop.slice(0, start)], open ? surroundings.pressure : NaN);
  if (!open) before.set(loop[start], end);
  for (const { branch, entries } of linesOf(definition).slice(1)) {
    follow(entries, behind.get(giverOf(definition, branch)) ?? NaN);
  }

  const most = fluidNamed(definition.fluid).maximumPressure;
  const problems = [...before.keys()].flatMap((entry) => changeProblems(entry, before.get(entry) ?? NaN, behind.get(entry) ?? NaN, most));
  if (problems.length === 0) problems.push(...mixingProblems(definition, before, behind));
  const last = loop.at(-1);
  if (open && last !== undefined && problems.length === 0 && end < surroundings.pressure * (1 - SAME_PRESSURE)) {
    problems.push({
      code: "exhaust-below-surroundings",
      entry: last,
      found: `${bar(end)} at the end of an open circuit`,
      expected: `at least the surroundings' ${bar(surroundings.pressure)}, into which it exhausts`,
    });
  }
  return { before, behind, problems };
}

function giverOf(definition: CycleDefinition, branch: string | undefined): BlockDefinition {
  for (const { entries } of linesOf(definition)) {
    const giver = entries.find((entry) => branchGiven(entry) === branch);
    if (giver !== undefined) return giver;
  }
  throw new Error(`branch ${branch} should have been checked`);
}

function mixingProblems({ branches, ...definition }: CycleDefinition, before: PressurePlan["before"], behind: PressurePlan["behind"]): Problem[] {
  return linesOf({ branches, ...definition }).flatMap(({ entries }) =>
    entries.flatMap((entry): Problem[] => {
      const name = branchTaken(entry);
      const last = name === undefined ? undefined : branches[name]?.at(-1);
      if (last === undefined) return [];
      const here = before.get(entry) ?? NaN;
      const joining = behind.get(last) ?? NaN;
      if (Math.abs(joining - here) <= MIXING_TOLERANCE * here) return [];
      return [
        {
          code: "mixing-pressures",
          entry,
          found: `${bar(joining)} at the end of branch ${name} and ${bar(here)} in the line that it joins`,
          expected: `pressures that agree within ${MIXING_TOLERANCE * 100} %`,
        },
      ];
    }),
  );
}

function changeProblems(entry: BlockDefinition, before: number, behind: number, most: number): Problem[] {
  const key = Object.keys(entry.values).find((name) => name.includes("pressure"));
  const problem = (code: string, found: string, expected: string): Problem[] => [
    { code, entry, ...(key === undefined ? {} : { key }), found, expected },
  ];
  if (behind <= 0) {
    return before <= 0 ? [] : problem("no-pressure-left", `a drop that leaves ${bar(behind)} of ${bar(before)}`, "a drop smaller than the pressure");
  }
  if (behind > most) {
    return problem("pressure-too-high", bar(behind), `at most ${bar(most)}, where the fluid's equation ends`);
  }
  const rises = behind > before * (1 + SAME_PRESSURE);
  const falls = behind < before * (1 - SAME_PRESSURE);
  const change = `${bar(before)} before it and ${bar(behind)} behind it`;
  switch (blockKind(entry.kind)?.pressureChange) {
    case "rises":
      return rises ? [] : problem("pressure-does-not-rise", change, "a pressure that rises through it");
    case "falls":
      return falls ? [] : problem("pressure-does-not-fall", change, "a pressure that falls through it");
    default:
      return rises ? problem("pressure-rises", change, "a pressure that does not rise through it") : [];
  }
}

/** Temperatures in the file at which the fluid's equation does not hold. */
function temperatureProblems(definition: CycleDefinition): Problem[] {
  const { fluid, surroundings } = definition;
  const { minimumTemperature, maximumTemperature } = fluidNamed(fluid);
  const outside = (temperature: number): boolean => temperature < minimumTemperature || temperature > maximumTemperature;
  const expected = `${minimumTemperature} K to ${maximumTemperature} K, where the equation of ${fluid} holds`;
  const problems: Problem[] = [];
  if (outside(surroundings.temperature)) {
    problems.push({ code: "temperature-outside-equation", key: "surroundings", found: `${surroundings.temperature} K`, expected });
  }
  const { temperature, pressure, relativeHumidity } = surroundings;
  if (problems.length === 0 && temperature < HOTTEST_HUMID && relativeHumidity * waterVapourPressure(temperature) >= pressure) {
    problems.push({
      code: "humidity-over-pressure",
      key: "surroundings",
      found: `water at ${Number((relativeHumidity * 100).toPrecision(4))} % humidity and ${temperature} K, whose vapour alone has ${bar(relativeHumidity * waterVapourPressure(temperature))}`,
      expected: `less than the surroundings' pressure of ${bar(pressure)}`,
    });
  }
  for (const entry of linesOf(definition).flatMap(({ entries }) => entries)) {
    for (const key of blockKind(entry.kind)?.keys ?? []) {
      if (key.type !== "number" || key.dimension !== "temperature") continue;
      const value = entry.values[key.name];
      if (typeof value === "number" && outside(value)) {
        problems.push({ code: "temperature-outside-equation", entry, key: key.name, found: `${value} K`, expected });
      }
    }
  }
  return problems;
}

function bar(pressure: number): string {
  return `${Number((pressure / 1e5).toPrecision(6))} bar`;
}
