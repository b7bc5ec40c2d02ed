import { readFile } from "node:fs/promises";
import { parse } from "csv-parse/sync";
import { InputError, type LocatedProblem } from "../cyclefile/errors.js";
import { nearest } from "../cyclefile/nearest.js";
import { toSI, unitNames, units, type Unit } from "../cyclefile/units.js";
import { FluidError } from "../fluids/errors.js";
import type { Fluid, FluidState, StateInput } from "../fluids/fluid.js";
import { ATMOSPHERE, PAIRS, propertyCalled } from "./state-input.js";

/** A row's state, or why it has none. */
export interface StateRow {
  /** Where it stands in the file. */
  readonly line: number;
  readonly state?: FluidState;
  /** "ok", or why the row has no state. */
  readonly status: string;
}

/** A row of cells and the line of the file on which it stands. */
interface Row {
  readonly cells: readonly string[];
  readonly line: number;
}

interface HeadedColumn {
  readonly property: string;
  readonly index: number;
  readonly unit: Unit;
}

/**
 * The states of a CSV file whose heading names properties with their units, as "temperature (K)" or "temperature_K"; of
 * more than two the first pair that fixes a state counts, and columns that are no property are passed over. A row that
 * has no state does not keep the others from theirs.
 *
 * @throws InputError where the file or its heading cannot be used
 */
export async function readStates(path: string, gas: Fluid): Promise<StateRow[]> {
  const [heading, ...body] = await readRows(path);
  const at = (line: number, found: string, expected: string): LocatedProblem => ({ code: "state-table", place: `${path}:${line}`, line, column: 0, found, expected });
  if (heading === undefined) throw new InputError([at(1, "an empty file", "a heading such as temperature_K,pressure_bar, and rows of numbers")]);
  const problems: LocatedProblem[] = [];
  const columns = heading.cells.flatMap((text, index) => {
    const column = headed(text, index);
    if (column !== null && "expected" in column) problems.push(at(heading.line, column.found, column.expected));
    return column === null || "expected" in column ? [] : [column];
  });
  if (problems.length > 0) throw new InputError(problems);
  const pair = chosen(columns);
  if (pair === undefined) {
    throw new InputError([at(heading.line, `the heading ${quoted(heading.cells.join(","))}`, "two columns that fix a state, such as temperature_K,pressure_bar")]);
  }
  return body.map(({ cells, line }): StateRow => {
    const given: Record<string, number> = {};
    for (const { property, index, unit } of pair) {
      const cell = cells[index] ?? "";
      if (cell === "" || !Number.isFinite(Number(cell))) {
        return { line, status: `${cell === "" ? "no value" : quoted(cell)}; expected a number for ${property}` };
      }
      given[property] = toSI(Number(cell), unit, ATMOSPHERE);
    }
    try {
      return { line, state: gas.at(given as unknown as StateInput), status: "ok" };
    } catch (error) {
      if (!(error instanceof FluidError)) throw error;
      return { line, status: error.message };
    }
  });
}

async function readRows(path: string): Promise<Row[]> {
  const refuse = (found: string, expected: string): never => {
    throw new InputError([{ code: "state-table", place: path, line: 0, column: 0, found, expected }]);
  };
  try {
    const text = new TextDecoder("utf-8", { fatal: true }).decode(await readFile(path));
    const options = { skip_empty_lines: true, trim: true, relax_column_count: true, bom: true, info: true };
    const rows = parse(text, options) as unknown as { record: string[]; info: { lines: number } }[];
    return rows.map(({ record, info }) => ({ cells: record, line: info.lines }));
  } catch (error) {
    const { code, message } = error as NodeJS.ErrnoException;
    if (code === "ENOENT") return refuse("no such file", "a CSV file");
    if (code === "EISDIR") return refuse("a directory", "a CSV file");
    if (error instanceof TypeError) return refuse("bytes that are no text", "a CSV file in UTF-8");
    return refuse(`a table that cannot be read (${message.split(", value")[0]})`, "comma-separated values");
  }
}

/** A piece of the file as a message may show it: short, and with no control character that a terminal would obey. */
function quoted(text: string): string {
  return JSON.stringify(text.length > 60 ? `${text.slice(0, 60)}…` : text);
}

/** What a column's heading says; null where it names no property. */
function headed(text: string, index: number): HeadedColumn | { found: string; expected: string } | null {
  const forms = [/^(.+)$/, /^(.+)_([^_]+)$/, /^([^(]+?)\s*\((.+)\)$/].map((form) => form.exec(text));
  const form = forms.find((found) => propertyCalled(found?.[1] ?? "") !== undefined);
  const property = propertyCalled(form?.[1] ?? "");
  if (property === undefined) return null;
  const name = form?.[2];
  if (property.kind === "fraction") return { property: property.name, index, unit: name === "%" ? units["%"] : { kind: "fraction", factor: 1 } };
  const known = unitNames([property.kind]);
  if (name === undefined) return { found: `the heading ${quoted(text)} without a unit`, expected: `${text}_${known[0]} or another of ${known.join(", ")}` };
  if (known.includes(name)) return { property: property.name, index, unit: units[name] };
  const near = nearest(name, known);
  return { found: `the unit ${quoted(name)} for ${property.words}`, expected: `one of ${known.join(", ")}${near === undefined ? "" : `; did you mean "${near}"?`}` };
}

function chosen(columns: readonly HeadedColumn[]): HeadedColumn[] | undefined {
  return PAIRS.map((pair) => pair.flatMap((name) => columns.find(({ property }) => property === name) ?? [])).find((found) => found.length === 2);
}
