import type { BreakEven } from "../studies/breakeven.js";
import type { ResultQuantity } from "../studies/quantities.js";
import type { Swept, SweepRow } from "../studies/sweep.js";
import { shownAs } from "./shown-quantity.js";
import { textTable, type Column } from "./table.js";
import { WIDTH, wrap } from "./wrap.js";

/** Reasons printed below a table; machines fail for the same reason over whole stretches. */
const MOST_REASONS = 3;

/** A sweep as a table: values of the variables, marked where the machine liquefies, and the results. */
export function sweepTable(swept: readonly Swept[], shown: readonly ResultQuantity[], rows: readonly SweepRow[]): string {
  const columns: Column[] = [
    ...swept.map(({ variable }) => ({ heading: variable.address, unit: variable.unit ?? "" })),
    ...shown.map(({ name, dimension }) => ({ heading: name, unit: shownAs(dimension).unit })),
  ];
  const cells = rows.map(({ values, results, wet }) => [
    // A blank keeps the numbers of dry and wet machines in line.
    ...values.map((value, i) => `${significantOf(value)}${i < values.length - 1 ? "" : wet ? "*" : " "}`),
    ...results.map((value, i) => cell(value, shown[i])),
  ]);
  return [...key(rows), columnBlocks(columns, cells, swept.length), ...reasons(swept, rows)].join("\n");
}

/** A sweep of two variables as a map of one result: the first variable downwards, the second across. */
export function sweepMap(swept: readonly [Swept, Swept], shown: ResultQuantity, rows: readonly SweepRow[], turns: readonly BreakEven[]): string {
  const [down, across] = swept;
  const { unit } = shownAs(shown.dimension);
  const columns: Column[] = [
    { heading: down.variable.address, unit: down.variable.unit ?? "" },
    ...across.values.map((value) => ({ heading: significantOf(value), unit: across.variable.unit ?? "" })),
  ];
  const cells = down.values.map((value, i) => {
    const machines = rows.slice(i * across.values.length, (i + 1) * across.values.length);
    // A blank keeps dry and wet numbers in line.
    return [significantOf(value)].concat(machines.map(({ results, wet }) => `${cell(results[0], shown)}${wet ? "*" : " "}`));
  });
  if (turns.length > 0) cells.push([`"${turns[0].condition.text}"`].concat(turns.map(turnCell)));
  const heading = `${shown.name}${unit === "" ? "" : ` in ${unit}`}; ${across.variable.address} across`;
  const below = turns.length > 0 ? [wrap(`Last line: the ${down.variable.address} at which "${turns[0].condition.text}" turns${down.variable.unit === undefined ? "" : `, in ${down.variable.unit}`}.`)] : [];
  return [heading, ...key(rows), columnBlocks(columns, cells, 1), ...below, ...reasons(swept, rows)].join("\n");
}

function key(rows: readonly SweepRow[]): string[] {
  const parts = [...(rows.some(({ wet }) => wet) ? ["* liquefies"] : []), ...(rows.some(({ status }) => status !== "solved") ? ["- no such number or no steady state"] : [])];
  return parts.length === 0 ? [] : [parts.join("; ")];
}

/** The break-even of one column of a map; "-" where there is none in the range, several with a slash between. */
function turnCell({ turns }: BreakEven): string {
  return `${turns.map(({ x }) => x.toPrecision(4)).join("/") || "-"} `;
}

/** A number of a swept variable, without digits that are only round-off. */
export function significantOf(value: number): string {
  return String(Number(value.toPrecision(6)));
}

function cell(value: number | null, { dimension }: ResultQuantity): string {
  if (value === null) return "-";
  const { scale, write } = shownAs(dimension);
  return write(scale(value));
}

/** A table too wide for the page, broken into several that each begin with the variables' columns. */
function columnBlocks(columns: readonly Column[], cells: readonly (readonly string[])[], leading: number): string {
  const width = (i: number): number => 2 + Math.max(columns[i].heading.length, columns[i].unit?.length ?? 0, ...cells.map((row) => row[i].length));
  const head = Array.from({ length: leading }, (_, i) => i);
  const headWidth = head.reduce((sum, i) => sum + width(i), 0);
  const blocks: number[][] = [];
  let room = 0;
  for (let i = leading; i < columns.length; i++) {
    if (blocks.length === 0 || width(i) > room) {
      blocks.push([...head]);
      room = WIDTH + 2 - headWidth;
    }
    blocks.at(-1)?.push(i);
    room -= width(i);
  }
  const tables = blocks.map((block) => textTable(block.map((i) => columns[i]), cells.map((row) => block.map((i) => row[i]))));
  return tables.join("\n\n");
}

/** Why machines have no steady state, each reason with the first values that it applies to. */
function reasons(swept: readonly Swept[], rows: readonly SweepRow[]): string[] {
  const first = new Map<string, SweepRow>();
  // Reasons that differ in their figures only are one reason.
  for (const row of rows) if (row.reason !== null) first.set(row.reason.replaceAll(/[\d.]+/g, "#"), first.get(row.reason.replaceAll(/[\d.]+/g, "#")) ?? row);
  if (first.size === 0) return [];
  const lines = [...first.values()].slice(0, MOST_REASONS).map(({ values, status, reason }) => {
    const place = values.map((value, i) => `${swept[i].variable.address} ${significantOf(value)}${swept[i].variable.unit === undefined ? "" : ` ${swept[i].variable.unit}`}`);
    return wrap(`${place.join(", ")}: ${status}. ${reason}`, "  ");
  });
  const more = first.size > MOST_REASONS ? [`  and ${first.size - MOST_REASONS} more reasons`] : [];
  return ["", ...lines, ...more];
}

/** The heading of a spreadsheet column. */
export function headed(name: string, unit: string | undefined): string {
  return unit === undefined || unit === "" ? name : `${name} (${unit})`;
}

/** A number in full for a spreadsheet. */
export function inFull(value: number): string {
  return String(Number(value.toPrecision(12)));
}
