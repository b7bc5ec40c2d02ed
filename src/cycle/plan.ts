import type { BlockDefinition } from "../blocks/definition.js";
import type { Problem } from "../blocks/problem.js";
import { blockKind } from "../blocks/registry.js";
import { fluid as fluidNamed } from "../fluids/registry.js";
import type { CycleDefinition } from "./definition.js";

/** Pressures before and behind each entry of the loop, Pa, in its order. */
export interface PressurePlan {
  readonly before: readonly number[];
  readonly behind: readonly number[];
  readonly problems: readonly Problem[];
}

/** Pa; two pressures that agree to this are one: a pressure typed twice with four digits. */
const PRESSURE_TOLERANCE = 1e-6;

/** What is wrong with a definition as a machine, in so far as it shows without solving. */
export function planProblems(definition: CycleDefinition): Problem[] {
  return [...temperatureProblems(definition), ...planPressures(definition).problems];
}

/**
 * Follows the pressure through the loop, from the surroundings in an open circuit, from the first block that fixes its
 * outlet in a closed one.
 */
export function planPressures(definition: CycleDefinition): PressurePlan {
  const { loop, surroundings, circuit } = definition;
  const before: number[] = Array.from({ length: loop.length }, () => NaN);
  const behind = [...before];
  const open = circuit === "open";
  const start = open ? 0 : loop.findIndex((entry) => outletPressure(entry, undefined) !== undefined);
  if (start < 0) {
    return { before, behind, problems: [{ code: "no-pressure-fixed", key: "loop", found: "pressure ratios and drops only", expected: "one block at least with an outlet-pressure: a closed circuit's pressure level is otherwise free" }] };
  }
  let pressure = open ? surroundings.pressure : NaN;
  for (let step = 0; step < loop.length; step++) {
    const index = (start + step) % loop.length;
    const entry = loop[index] as BlockDefinition;
    before[index] = pressure;
    pressure = outletPressure(entry, Number.isNaN(pressure) ? undefined : pressure) ?? NaN;
    behind[index] = pressure;
  }
  if (!open) before[start] = pressure;
  const problems = loop.flatMap((entry, index) =>
    changeProblems(entry, before[index] ?? NaN, behind[index] ?? NaN, fluidNamed(definition.fluid).maximumPressure),
  );
  const last = loop.at(-1);
  if (open && last !== undefined && problems.length === 0 && pressure < surroundings.pressure * (1 - PRESSURE_TOLERANCE)) {
    problems.push({
      code: "exhaust-below-surroundings",
      entry: last,
      found: `${bar(pressure)} at the end of an open circuit`,
      expected: `at least the surroundings' ${bar(surroundings.pressure)}, into which it exhausts`,
    });
  }
  return { before, behind, problems };
}

function outletPressure(entry: BlockDefinition, inletPressure: number | undefined): number | undefined {
  return blockKind(entry.kind)?.outletPressure(entry, inletPressure);
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
  const rises = behind > before * (1 + PRESSURE_TOLERANCE);
  const falls = behind < before * (1 - PRESSURE_TOLERANCE);
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
function temperatureProblems({ loop, fluid, surroundings }: CycleDefinition): Problem[] {
  const { minimumTemperature, maximumTemperature } = fluidNamed(fluid);
  const outside = (temperature: number): boolean => temperature < minimumTemperature || temperature > maximumTemperature;
  const expected = `${minimumTemperature} K to ${maximumTemperature} K, where the equation of ${fluid} holds`;
  const problems: Problem[] = [];
  if (outside(surroundings.temperature)) {
    problems.push({ code: "temperature-outside-equation", key: "surroundings", found: `${surroundings.temperature} K`, expected });
  }
  for (const entry of loop) {
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
