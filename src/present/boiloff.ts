import asciichart from "asciichart";
import type { Boiloff, OxygenMark, Remainder } from "../studies/boiloff.js";
import { bars, fixed, fullDigits } from "./numbers.js";
import { csvTable, textTable, type Column } from "./table.js";
import { wrap } from "./wrap.js";

const HEIGHT = 12;
/** Points across; with the labels the chart stays within 100 columns. */
const ACROSS = 85;
/** Columns before the first point: the label and the axis. */
const MARGIN = 10;

/** The composition of an evaporating liquid for a person: table, chart, and where it passes the marks. */
export function boiloffText(answer: Boiloff, origin: string, colour: boolean): string {
  const { start, pressure, marks } = answer;
  const heading = wrap(
    `Evaporation at ${bars(pressure)} of ${origin}; at the start ${share(start.nitrogen)} % nitrogen, ${share(start.argon)} % argon, ${share(start.oxygen)} % oxygen (mole fractions).`,
  );
  const meaning = "Open: the vapour leaves at once. Closed: all vapour stays with the liquid and in equilibrium with it.";
  return [heading, `${table(answer)}\n${wrap(meaning)}`, chart(answer, colour), marks.map((mark) => wrap(markText(mark))).join("\n")].join("\n\n");
}

/** Every point of both tables, all digits. */
export function boiloffCsv({ open, closed }: Boiloff): string {
  const columns = ["vessel", "evaporated (mol/mol)", "temperature (K)", "nitrogen (mol/mol)", "argon (mol/mol)", "oxygen (mol/mol)"];
  const rows = (vessel: string, points: readonly Remainder[]): string[][] =>
    points.map(({ evaporated, temperature, liquid: { nitrogen, argon, oxygen } }) => [vessel, ...[evaporated, temperature, nitrogen, argon, oxygen].map(fullDigits)]);
  return csvTable(
    columns.map((heading) => ({ heading })),
    [...rows("open", open), ...rows("closed", closed)],
  );
}

function table({ open, closed }: Boiloff): string {
  const vessel = (name: string): Column[] => [
    { heading: name, unit: "T, K" },
    { heading: "nitrogen", unit: "%" },
    { heading: "argon", unit: "%" },
    { heading: "oxygen", unit: "%" },
  ];
  const columns: Column[] = [{ heading: "evaporated", unit: "%" }, ...vessel("open"), ...vessel("closed")];
  // The open vessel's last row stands just before the end, where no liquid is left to have a composition.
  const fractions = [...new Set([...open, ...closed].map(({ evaporated }) => evaporated))].toSorted((a, b) => a - b);
  const rows = fractions.map((evaporated) => [share(evaporated), ...[open, closed].flatMap((points) => cells(points.find((point) => point.evaporated === evaporated)))]);
  return textTable(columns, rows);
}

function cells(point: Remainder | undefined): string[] {
  if (point === undefined) return ["-", "-", "-", "-"];
  const { temperature, liquid } = point;
  return [fixed(temperature, 2), share(liquid.nitrogen), share(liquid.argon), share(liquid.oxygen)];
}

/** Oxygen in the liquid of both vessels over the fraction evaporated. */
function chart({ open, closed }: Boiloff, colour: boolean): string {
  const plot = asciichart.plot([oxygenAcross(closed), oxygenAcross(open)], {
    height: HEIGHT,
    format: (value) => fixed(value, 0).padStart(MARGIN - 2),
    ...(colour ? { colors: [asciichart.blue, asciichart.red] } : {}),
  });
  const [left, between, right] = ["0 %", "evaporated", "100 %"];
  const room = ACROSS - left.length - right.length;
  const axis = left + between.padStart(Math.floor((room + between.length) / 2)).padEnd(room) + right;
  const indent = " ".repeat(MARGIN);
  return ["% oxygen in the liquid", ...plot.split("\n").map((line) => line.trimEnd()), indent + axis, `${indent}upper line: open; lower line: closed`].join("\n");
}

/** Percent of oxygen on straight lines between the points, at evenly spread fractions evaporated. */
function oxygenAcross(points: readonly Remainder[]): number[] {
  const last = points.length - 1;
  return Array.from({ length: ACROSS }, (_, i) => {
    const evaporated = Math.min(i / (ACROSS - 1), points[last].evaporated);
    const next = Math.max(1, points.findIndex((point) => point.evaporated >= evaporated - 1e-12));
    const [a, b] = [points[next - 1], points[next]];
    const place = (evaporated - a.evaporated) / (b.evaporated - a.evaporated);
    return 100 * (a.liquid.oxygen + place * (b.liquid.oxygen - a.liquid.oxygen));
  });
}

function markText({ oxygen, open, closed }: OxygenMark): string {
  const passed = `${fixed(oxygen * 100, 1).replace(".0", "")} % oxygen`;
  if (open === 0 && closed === 0) return `The liquid holds more than ${passed} from the start.`;
  const reached = [open === null ? [] : [`${share(open)} % has evaporated (open)`], closed === null ? [] : [`${share(closed)} % (closed)`]].flat();
  if (reached.length === 0) return `The liquid never passes ${passed}.`;
  const never = open === null ? "; never in an open vessel" : closed === null ? "; never in a closed vessel" : "";
  return `The liquid passes ${passed} when ${reached.join(", ")}${never}.`;
}

/** A fraction as a percentage without its sign. */
function share(fraction: number): string {
  return fixed(fraction * 100, 1);
}
