import type { StopColumn } from "./columns.js";
import { WIDTH } from "./wrap.js";

/** Characters between two boxes: a line with its station's number and an arrowhead. */
export const GAP = 6;
/** Characters where a line goes on in another band: the letter and a space. */
export const LETTER = 2;
/** Room behind the last box, beyond which the label of the turn may reach. */
const BESIDE = 5;

/** Columns of a column's boxes: the wider of the two. */
export function columnWidth({ out, back }: StopColumn): number {
  const widths = [out, back].map((stop) => {
    if (stop === undefined) return 0;
    const text = Math.max(...stop.lines.map(({ length }) => length));
    return stop.boxed ? text + 4 : text + 1;
  });
  return Math.max(...widths);
}

/** The columns cut into as few bands as fit a terminal, of much the same width. */
export function bandsOf(columns: readonly StopColumn[]): StopColumn[][] {
  const fewest = cut(columns, WIDTH).length;
  let limit = WIDTH;
  while (cut(columns, limit - 1).length === fewest && limit > 1) limit--;
  return cut(columns, limit);
}

function cut(columns: readonly StopColumn[], limit: number): StopColumn[][] {
  const bands: StopColumn[][] = [];
  let width = Infinity;
  columns.forEach((column, i) => {
    const needed = GAP + columnWidth(column);
    const behind = i === columns.length - 1 ? BESIDE : GAP + LETTER;
    if (width + needed + behind > limit) {
      bands.push([]);
      width = bands.length === 1 ? -GAP : LETTER;
    }
    bands.at(-1)?.push(column);
    width += needed;
  });
  return bands;
}
