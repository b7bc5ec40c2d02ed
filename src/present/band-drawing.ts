import type { Station } from "../cycle/result.js";
import { columnWidth, GAP, LETTER } from "./bands.js";
import { Canvas } from "./canvas.js";
import type { StopColumn } from "./columns.js";
import type { Stop } from "./machine-stops.js";
import { fixed } from "./numbers.js";

/** Rows of a band: the boxes of the way out with their line, a row between, and the boxes of the way back. */
const OUT = 0;
const OUT_LINE = OUT + 1;
const OUT_FLOOR = OUT + 3;
const BETWEEN = OUT_FLOOR + 1;
const BACK = BETWEEN + 1;
/** From a box's left edge to the line that comes up into it. */
const RISE = 3;

/** The letters at which the lines of a band go on in the next; empty for a line that does not. */
export interface Seam {
  readonly out: string;
  readonly back: string;
}

/** Columns to be drawn beside each other, and what lies around them. */
export interface Placing {
  readonly columns: readonly StopColumn[];
  readonly before: Seam | undefined;
  readonly behind: Seam | undefined;
  /** Whether the gas turns back behind the last column. */
  readonly turns: boolean;
  /** Whether it comes back into the first column's stop. */
  readonly closes: boolean;
  /** The column in which the way back ends: negative where it goes on in an earlier band. */
  readonly backEnd: number;
}

/** A column with its place. */
interface Placed extends StopColumn {
  readonly left: number;
  readonly width: number;
}

/** One band of a line: boxes on the way out, and beneath them those on the way back. */
export function drawBand(placing: Placing): string {
  const { before, behind, turns, closes } = placing;
  const canvas = new Canvas();
  const columns = placed(placing);
  const [first] = columns;
  const last = columns.at(-1);
  if (first === undefined || last === undefined) return "";
  const hasBoxesBack = columns.some(({ back }) => back?.boxed === true);
  const backLine = hasBoxesBack ? BACK + 1 : BACK;

  drawOut(canvas, columns, behind !== undefined);
  drawBack(canvas, columns, backLine, placing);
  for (const { out, back, left, width } of columns) {
    // The two sides of one block, between which heat passes.
    if (out?.sideOf !== undefined && out.sideOf === back?.sideOf) canvas.put(left + Math.floor(width / 2), BETWEEN, "╎");
  }
  if (before !== undefined) {
    canvas.put(0, OUT_LINE, before.out);
    arrow(canvas, LETTER, OUT_LINE, "right", undefined, first.out !== undefined);
    canvas.put(0, backLine, before.back);
    if (before.back !== "") arrow(canvas, LETTER, backLine, "left", first.back?.station, true);
  }
  if (behind !== undefined) {
    const right = last.left + last.width + GAP + 1;
    canvas.put(right, OUT_LINE, behind.out);
    canvas.put(right, backLine, behind.back);
  }
  if (turns) drawTurn(canvas, last, backLine);
  if (closes) drawReturn(canvas, first, backLine);
  return canvas.toString();
}

function placed({ columns, before }: Placing): Placed[] {
  let left = before === undefined ? 0 : LETTER + GAP;
  return columns.map((column) => {
    const width = columnWidth(column);
    const here = { ...column, left, width };
    left += width + GAP;
    return here;
  });
}

/** The way out, each column with the line that leaves it. */
function drawOut(canvas: Canvas, columns: readonly Placed[], goesOn: boolean): void {
  columns.forEach(({ out, left, width }, i) => {
    const next = columns[i + 1];
    if (out === undefined) canvas.put(left, OUT_LINE, "─".repeat(width));
    else if (out.boxed) canvas.box(left, OUT, width, out.lines);
    else drawEnd(canvas, left, OUT_LINE, out, out.station === undefined ? ` ${out.lines[0]}` : `${out.lines[0]} `.padEnd(width, "─"));
    if (next === undefined && !goesOn) return;
    arrow(canvas, left + width, OUT_LINE, "right", out?.station, next === undefined || next.out !== undefined);
    if (out?.boxed === true) canvas.put(left + width - 1, OUT_LINE, "├");
  });
}

/** The way back, each column with the line that comes to it. */
function drawBack(canvas: Canvas, columns: readonly Placed[], y: number, { backEnd, behind }: Placing): void {
  columns.forEach(({ back, left, width }, i) => {
    if (i < backEnd) return;
    const next = columns[i + 1];
    if (back === undefined) canvas.put(left, y, "─".repeat(width));
    else if (back.boxed) canvas.box(left, BACK, width, back.lines);
    else drawEnd(canvas, left, y, back, `${back.lines[0]} `.padStart(width));
    if (next !== undefined || behind !== undefined) arrow(canvas, left + width, y, "left", next?.back?.station, back !== undefined);
    if (back?.boxed === true && i > 0) canvas.put(left, y, "┤");
  });
}

/** Where a line comes from or goes to. */
function drawEnd(canvas: Canvas, x: number, y: number, { lines: [, below] }: Stop, title: string): void {
  canvas.put(x, y, title);
  if (below !== "") canvas.put(x, y + 1, below);
}

/** A line through the gap between two boxes, with the station's number in it and its temperature beneath. */
function arrow(canvas: Canvas, x: number, y: number, towards: "left" | "right", station: Station | undefined, arrives: boolean): void {
  const shaft = centred(station === undefined ? "" : String(station.station), GAP - 1, "─");
  const [leftHead, rightHead] = arrives ? ["◄", "►"] : ["─", "─"];
  canvas.put(x, y, towards === "right" ? shaft + rightHead : leftHead + shaft);
  if (station !== undefined) canvas.put(x, y + 1, centred(temperature(station), GAP, " "));
}

function centred(text: string, width: number, around: string): string {
  return text.padStart(Math.ceil((width + text.length) / 2), around).padEnd(width, around);
}

/** Whole kelvins do to find one's way; a few kelvins need a decimal. */
function temperature({ temperature: kelvins }: Station): string {
  return `${fixed(kelvins, kelvins < 10 ? 1 : 0)} K`;
}

/** The label of a line that goes up or down. */
function beside(station: Station | undefined): string {
  return station === undefined ? "│" : `${station.station} ${temperature(station)}`;
}

/** From the last stop on the way out down to the way back. */
function drawTurn(canvas: Canvas, { out, back, left, width }: Placed, backLine: number): void {
  const x = left + Math.floor(width / 2);
  canvas.put(x, OUT_FLOOR, "┬");
  canvas.put(x, BETWEEN, beside(out?.station));
  if (back !== undefined) {
    canvas.put(x, BACK, "▼");
    return;
  }
  if (backLine > BACK) canvas.put(x, BACK, "│");
  canvas.put(x, backLine, "┘".padEnd(left + width - x));
}

/** From the last stop on the way back up to the first stop of a closed loop. */
function drawReturn(canvas: Canvas, { out, back, width }: Placed, backLine: number): void {
  if (out === undefined) {
    canvas.put(0, OUT_LINE, "┌".padStart(RISE + 1));
    for (let y = OUT_LINE + 1; y < BETWEEN; y++) canvas.put(RISE, y, "│");
  } else {
    canvas.put(RISE, OUT_FLOOR, "▲");
  }
  canvas.put(RISE, BETWEEN, beside(back?.station));
  if (back !== undefined) {
    canvas.put(RISE, BACK, "┴");
    return;
  }
  if (backLine > BACK) canvas.put(RISE, BACK, "│");
  canvas.put(0, backLine, "└".padStart(RISE + 1).padEnd(width, "─"));
}
