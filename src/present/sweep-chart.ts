import asciichart from "asciichart";
import type { ResultQuantity } from "../studies/quantities.js";
import type { Swept, SweepRow } from "../studies/sweep.js";
import { shownAs, withUnit } from "./shown-quantity.js";
import { significantOf } from "./sweep-table.js";

const HEIGHT = 10;
/** Columns of the line; with the labels the chart stays within 100. */
const ACROSS = 78;
const LABEL = 10;
/** Share of a value below which its changes are none. */
const FLAT = 1e-6;
/** Columns before the line: label, blank, axis. */
const BEFORE = LABEL + 2;

/** A place on the axis to point at. */
export interface Mark {
  /** In the variable's unit. */
  readonly x: number;
  readonly text: string;
}

/** One result over the swept variable, gaps where there is no steady state; null where there is no line to draw. */
export function sweepChart({ variable }: Swept, which: number, shown: ResultQuantity, rows: readonly SweepRow[], marks: readonly Mark[]): string | null {
  const points = rows.map(({ values, results }) => ({ x: values[0], y: results[which] })).toSorted((a, b) => a.x - b.x);
  const [from, to] = [points[0].x, points[points.length - 1].x];
  const solved = points.filter(({ y }) => y !== null).map(({ y }) => y as number);
  if (points.length < 3 || from === to || solved.length < 2 || isFlat(solved)) return null;
  const { unit, scale, write } = shownAs(shown.dimension);
  const line = Array.from({ length: ACROSS + 1 }, (_, i) => between(points, from + ((to - from) * i) / ACROSS));
  const filler = scale(Math.min(...solved));
  const chart = asciichart.plot(line.map((y) => (y === null ? filler : scale(y))), { height: HEIGHT, format: (value) => write(value).padStart(LABEL) });
  const drawn = chart.split("\n").map((text) =>
    text
      .padEnd(BEFORE + ACROSS)
      .split("")
      .map((symbol, i) => (i >= BEFORE && (line[i - BEFORE] === null || line[i - BEFORE + 1] === null) ? " " : symbol))
      .join("")
      .trimEnd(),
  );
  const [left, right] = [from, to].map((x) => withUnit(significantOf(x), variable.unit));
  const axis = `${" ".repeat(BEFORE)}${left}${variable.address.padStart((ACROSS - left.length - right.length + variable.address.length) >> 1).padEnd(ACROSS - left.length - right.length)}${right}`;
  const pointers = marks.filter(({ x }) => x >= from && x <= to).map(({ x, text }) => pointer(Math.round(((x - from) / (to - from)) * (ACROSS - 1)), text));
  return [`${shown.name}${unit === "" ? "" : `, ${unit}`}`, ...drawn, ...pointers, axis].join("\n");
}

/** Whether values differ by no more than their round-off. */
function isFlat(values: readonly number[]): boolean {
  const [least, most] = [Math.min(...values), Math.max(...values)];
  return most - least <= FLAT * Math.max(Math.abs(least), Math.abs(most));
}

/** An arrow under a column, its text on the side where there is room. */
function pointer(column: number, text: string): string {
  const indent = " ".repeat(BEFORE);
  return column + text.length + 2 > ACROSS ? `${indent}${`${text} ^`.padStart(column + 1)}` : `${indent}${" ".repeat(column)}^ ${text}`;
}

/** The value on the straight line between the points on either side; null beside a gap. */
function between(points: readonly { x: number; y: number | null }[], x: number): number | null {
  const next = Math.max(1, points.findIndex((point) => point.x >= x - 1e-12 * Math.abs(x)));
  const [left, right] = [points[next - 1], points[next]];
  if (x === left.x || left.x === right.x) return left.y;
  if (left.y === null || right.y === null) return null;
  return left.y + ((x - left.x) / (right.x - left.x)) * (right.y - left.y);
}
