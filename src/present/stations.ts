import type { Station } from "../cycle/result.js";
import { fixed, fullDigits, significant } from "./numbers.js";
import { writeTable, type Column, type TableFormat } from "./table.js";
import { WIDTH } from "./wrap.js";

/** A column of the state-point table, with its digits for reading and for a spreadsheet. */
interface StationColumn extends Column {
  readonly shown: (station: Station) => string;
  /** SI-scaled to the column's unit, in full. */
  readonly full: (station: Station) => string;
}

const number = (value: number | null): string => (value === null ? "" : fullDigits(value));

const COLUMNS: readonly StationColumn[] = [
  { heading: "no", shown: ({ station }) => String(station), full: ({ station }) => String(station) },
  { heading: "after", align: "left", shown: ({ after }) => after, full: ({ after }) => after },
  { heading: "T", unit: "K", shown: ({ temperature }) => fixed(temperature, 2), full: ({ temperature }) => number(temperature) },
  { heading: "p", unit: "bar", shown: ({ pressure }) => significant(pressure / 1e5, 4), full: ({ pressure }) => number(pressure / 1e5) },
  { heading: "h", unit: "kJ/kg", shown: ({ enthalpy }) => fixed(enthalpy / 1e3, 2), full: ({ enthalpy }) => number(enthalpy / 1e3) },
  { heading: "s", unit: "kJ/(kg K)", shown: ({ entropy }) => fixed(entropy / 1e3, 4), full: ({ entropy }) => number(entropy / 1e3) },
  { heading: "density", unit: "kg/m3", shown: ({ density }) => significant(density, 4), full: ({ density }) => number(density) },
  { heading: "vapour", unit: "kg/kg", shown: ({ vapourFraction }) => vapour(vapourFraction), full: ({ vapourFraction }) => number(vapourFraction) },
  { heading: "phase", align: "left", shown: ({ phase }) => phase, full: ({ phase }) => phase },
  { heading: "flow", unit: "g/s", shown: ({ massFlow }) => significant(massFlow * 1e3, 4), full: ({ massFlow }) => number(massFlow * 1e3) },
  { heading: "exergy", unit: "kJ/kg", shown: ({ exergy }) => fixed(exergy / 1e3, 2), full: ({ exergy }) => number(exergy / 1e3) },
];

function vapour(fraction: number | null): string {
  if (fraction === null) return "-";
  return fraction === 0 || fraction === 1 ? String(fraction) : fixed(fraction, 4);
}

/** Columns that a terminal does without where long names leave no room, first the one missed least. */
const SPARED = ["exergy", "s", "density"];

/** The state points of a cycle, in the order in which the gas passes them. Spreadsheet formats have all digits and columns. */
export function stationTable(stations: readonly Station[], format: TableFormat = "text"): string {
  const write = (columns: readonly StationColumn[]): string =>
    writeTable(
      format,
      columns,
      stations.map((station) => columns.map((column) => (format === "csv" ? column.full : column.shown)(station))),
    );
  const table = write(COLUMNS);
  if (format !== "text" || widest(table) <= WIDTH) return table;
  const narrower = SPARED.map((_, i) => write(COLUMNS.filter(({ heading }) => !SPARED.slice(0, i + 1).includes(heading))));
  return narrower.find((each) => widest(each) <= WIDTH) ?? narrower[narrower.length - 1];
}

function widest(text: string): number {
  return Math.max(...text.split("\n").map((line) => line.length));
}
