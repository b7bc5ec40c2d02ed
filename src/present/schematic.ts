import type { CycleDefinition } from "../cycle/definition.js";
import type { CycleResult } from "../cycle/result.js";
import { drawBand, type Seam } from "./band-drawing.js";
import { bandsOf } from "./bands.js";
import { folded } from "./columns.js";
import { drawnLines, type DrawnLine } from "./machine-stops.js";

const LETTERS = "abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ";

/** The machine as boxes joined by lines, each with its station's number and temperature; at most 100 columns wide. */
export function schematic(definition: CycleDefinition, { stations }: Pick<CycleResult, "stations">): string {
  let count = 0;
  const letter = (): string => LETTERS.charAt(count++ % LETTERS.length);
  const bands = drawnLines(definition, stations).flatMap((line) => drawLine(line, letter));
  const legend = "In each line its station's number, beneath it the temperature.";
  return [count === 0 ? legend : `${legend} A line goes on at its letter.`, ...bands].join("\n\n");
}

/** A line in as many bands as its width asks for. */
function drawLine({ stops, closed }: DrawnLine, letter: () => string): string[] {
  const columns = folded(stops);
  const turns = closed || columns.some(({ back }) => back !== undefined);
  /** The column in which the way back ends: a closed one goes on to the beginning. */
  const end = closed ? 0 : columns.findIndex(({ back }) => back !== undefined);
  let start = 0;
  let before: Seam | undefined;
  return bandsOf(columns).map((band) => {
    const next = start + band.length;
    const isLast = next === columns.length;
    const behind = isLast ? undefined : { out: letter(), back: turns && end < next ? letter() : "" };
    const drawn = drawBand({ columns: band, before, behind, turns: isLast && turns, closes: start === 0 && closed, backEnd: turns ? end - start : Infinity });
    before = behind;
    start = next;
    return drawn;
  });
}
