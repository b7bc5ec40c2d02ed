import type { FluidState } from "../fluids/fluid.js";
import { fixed, fullDigits, significant } from "./numbers.js";
import { writeTable, type Column, type TableFormat } from "./table.js";

/** A property of a state: its heading, unit and digits. */
interface Property extends Column {
  readonly name: string;
  readonly value: (state: FluidState) => number | string | null;
  readonly show: (value: number) => string;
}

const PROPERTIES: readonly Property[] = [
  { name: "temperature", heading: "T", unit: "K", value: ({ temperature }) => temperature, show: (value) => fixed(value, 4) },
  { name: "pressure", heading: "p", unit: "bar", value: ({ pressure }) => pressure / 1e5, show: (value) => significant(value, 6) },
  { name: "density", heading: "density", unit: "kg/m3", value: ({ density }) => density, show: (value) => significant(value, 6) },
  { name: "enthalpy", heading: "h", unit: "kJ/kg", value: ({ enthalpy }) => enthalpy / 1e3, show: (value) => fixed(value, 3) },
  { name: "entropy", heading: "s", unit: "kJ/(kg K)", value: ({ entropy }) => entropy / 1e3, show: (value) => fixed(value, 5) },
  { name: "internal energy", heading: "u", unit: "kJ/kg", value: ({ internalEnergy }) => internalEnergy / 1e3, show: (value) => fixed(value, 3) },
  { name: "isobaric heat capacity", heading: "cp", unit: "kJ/(kg K)", value: ({ isobaricHeatCapacity: cp }) => (cp === null ? null : cp / 1e3), show: (value) => fixed(value, 4) },
  { name: "isochoric heat capacity", heading: "cv", unit: "kJ/(kg K)", value: ({ isochoricHeatCapacity: cv }) => (cv === null ? null : cv / 1e3), show: (value) => fixed(value, 4) },
  { name: "speed of sound", heading: "sound", unit: "m/s", value: ({ speedOfSound }) => speedOfSound, show: (value) => fixed(value, 2) },
  { name: "viscosity", heading: "viscosity", unit: "uPa s", value: ({ viscosity }) => (viscosity === null ? null : viscosity * 1e6), show: (value) => significant(value, 5) },
  { name: "thermal conductivity", heading: "conduct.", unit: "mW/(m K)", value: ({ thermalConductivity: k }) => (k === null ? null : k * 1e3), show: (value) => significant(value, 5) },
  { name: "vapour fraction", heading: "vapour", unit: "kg/kg", value: ({ vapourFraction }) => vapourFraction, show: (value) => significant(value, 5) },
  { name: "phase", heading: "phase", align: "left", value: ({ phase }) => phase, show: String },
];

/** One state, a property a line. */
export function stateSheet(fluid: string, state: FluidState): string {
  const lines = PROPERTIES.map(({ name, unit = "", value, show }) => {
    const found = value(state);
    const text = found === null ? `none (${absence(name, state)})` : typeof found === "number" ? `${show(found)} ${unit}` : found;
    return `  ${name.padEnd(25)}${text}`;
  });
  return [fluid, ...lines, "  (enthalpy and entropy are zero in the saturated liquid at 101.325 kPa)"].join("\n");
}

/** Why a property has no value at a state. */
function absence(property: string, { phase }: FluidState): string {
  if (phase === "two-phase") return "between bubble and dew";
  return property === "vapour fraction" ? "above the critical pressure" : "no published correlation at hand";
}

/** A row of a table of states. */
export interface ListedState {
  /** Line of the file that it was read from. */
  readonly line: number;
  readonly state?: FluidState;
  /** "ok", or why it has none. */
  readonly status: string;
}

/** What a terminal's width has no room for in a list. */
const ONLY_ELSEWHERE = new Set(["u", "cv", "viscosity", "conduct."]);

/** Many states, one a row; outside text the last column says why a row has none. */
export function stateList(rows: readonly ListedState[], format: TableFormat): string {
  const isText = format === "text";
  const properties = PROPERTIES.filter(({ heading }) => !isText || !ONLY_ELSEWHERE.has(heading));
  const cell = ({ value, show }: Property, state: FluidState | undefined): string => {
    const found = state === undefined ? null : value(state);
    if (found === null) return format === "csv" ? "" : "-";
    if (typeof found === "string") return found;
    return format === "csv" ? fullDigits(found) : show(found);
  };
  const columns: Column[] = [{ heading: "line" }, ...properties, ...(isText ? [] : [{ heading: "status", align: "left" } as const])];
  const cells = rows.map(({ line, state, status }) => [String(line), ...properties.map((property) => cell(property, state)), ...(isText ? [] : [status])]);
  return writeTable(format, columns, cells);
}
