import { readFile } from "node:fs/promises";
import { parse } from "csv-parse/sync";
import { InputError, type LocatedProblem } from "../cyclefile/errors.js";
import { nearest } from "../cyclefile/nearest.js";
import { toSI, units } from "../cyclefile/units.js";
import { FluidError } from "../fluids/errors.js";
import type { Fluid, FluidState } from "../fluids/fluid.js";
import { pairOf } from "./state-input.js";

/** A row's state, or why it has none. */
export interface StateRow {
  readonly state?: FluidState;
  readonly fault?: string;
}

/** Names that a heading may give a property. */
const HEADINGS: Readonly<Record<string, string>> = {
  temperature: "temperature",
  t: "temperature",
  pressure: "pressure",
  p: "pressure",
  enthalpy: "enthalpy",
  h: "enthalpy",
  entropy: "entropy",
  s: "entropy",
  vapour: "quality",
  density: "density",
};
const ATMOSPHERE = 101325;

interface HeadedColumn {
  readonly property: string;
  readonly index: number;
  readonly unit: (typeof units)[string];
}

/**
 * The states of a CSV file whose heading names properties with their units, "temperature (K)"; of more than two the first pair
 * that fixes a state counts, other columns are passed over.
 *
 * @throws InputError where the file or its heading cannot be used
 */
export async function readStates(path: string, gas: Fluid): Promise<StateRow[]> {
  const refuse = (line: number, found: string, expected: string): never => {
    const problem: LocatedProblem = { code: "state-table", place: line === 0 ? path : `${path}:${line}:1`, line, column: 1, found, expected };
    throw new InputError([problem]);
  };
  let text = "";
  try {
    text = await readFile(path, "utf8");
  } catch (error) {
    refuse(0, `a file that cannot be read (${(error as NodeJS.ErrnoException).code ?? ""})`, "a CSV file");
  }
  let rows: string[][] = [];
  try {
    rows = parse(text, { skip_empty_lines: true, trim: true, relax_column_count: true, bom: true });
  } catch (error) {
    refuse(1, `a table that cannot be read (${(error as Error).message})`, "comma-separated values");
  }
  const [heading, ...body] = rows;
  if (heading === undefined) return refuse(1, "an empty file", "a heading and rows of states");
  const columns = chosen(headed(heading, refuse));
  if (columns === undefined) {
    return refuse(1, `the heading ${heading.join(", ")}`, "two columns that fix a state, such as temperature (K) and pressure (bar)");
  }
  return body.map((cells, row): StateRow => {
    const given: Record<string, number> = {};
    for (const { property, index, unit } of columns) {
      const cell = cells[index] ?? "";
      if (cell === "" || !Number.isFinite(Number(cell))) return { fault: `${path}:${row + 2}: "${cell}" is no number` };
      given[property] = toSI(Number(cell), unit, ATMOSPHERE);
    }
    try {
      return { state: gas.at(pairOf(given, `${path}:${row + 2}`)) };
    } catch (error) {
      if (!(error instanceof FluidError)) throw error;
      return { fault: `${path}:${row + 2}: ${error.message}` };
    }
  });
}

function headed(heading: readonly string[], refuse: (line: number, found: string, expected: string) => never): HeadedColumn[] {
  return heading.flatMap((text, index) => {
    const match = /^([A-Za-z]+)(?:\s*\((.+)\)|_(.+))?$/.exec(text);
    const property = HEADINGS[match?.[1].toLowerCase() ?? ""];
    if (property === undefined) return [];
    const name = match?.[2] ?? match?.[3];
    if (name === undefined || property === "quality") return property === "quality" ? [{ property, index, unit: { kind: "fraction", factor: 1 } as const }] : refuse(1, `the heading "${text}" without a unit`, `${text} (unit)`);
    const unit = Object.hasOwn(units, name) ? units[name] : undefined;
    if (unit === undefined) return refuse(1, `the unknown unit "${name}"`, `a unit; the nearest is ${nearest(name, Object.keys(units)) ?? "none"}`);
    return [{ property, index, unit }];
  });
}

/** The first pair that fixes a state, pressure with temperature last: a wet state is not fixed by those of a pure fluid. */
function chosen(columns: readonly HeadedColumn[]): HeadedColumn[] | undefined {
  for (const pair of [["pressure", "enthalpy"], ["pressure", "entropy"], ["pressure", "quality"], ["temperature", "density"], ["temperature", "pressure"]]) {
    const found = pair.flatMap((name) => columns.find(({ property }) => property === name) ?? []);
    if (found.length === 2) return found;
  }
  return undefined;
}
