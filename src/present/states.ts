import type { FluidState } from "../fluids/fluid.js";
import { fixed, significant } from "./numbers.js";
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
  { name: "vapour fraction", heading: "vapour", unit: "kg/kg", value: ({ vapourFraction }) => vapourFraction, show: (value) => significant(value, 5) },
  { name: "phase", heading: "phase", align: "left", value: ({ phase }) => phase, show: String },
];

/** One state, a property a line. */
export function stateSheet(fluid: string, state: FluidState): string {
  const lines = PROPERTIES.map(({ name, unit = "", value, show }) => {
    const found = value(state);
    if (found === null) return `  ${name.padEnd(24)}no meaning here`;
    return `  ${name.padEnd(24)}${typeof found === "number" ? `${show(found)} ${unit}` : found}`.trimEnd();
  });
  return [fluid, ...lines, "  (enthalpy and entropy are zero in the saturated liquid at 101.325 kPa)"].join("\n");
}

/** Many states, one a row; a row without a state says why. */
export function stateList(rows: readonly { readonly state?: FluidState; readonly fault?: string }[], format: TableFormat): string {
  const columns = PROPERTIES.filter(({ heading }) => format !== "text" || heading !== "u");
  const cells = rows.map(({ state, fault }) => {
    if (state === undefined) return [...columns.map(() => "-"), fault ?? ""];
    return [
      ...columns.map(({ value, show }) => {
        const found = value(state);
        if (found === null) return format === "csv" ? "" : "-";
        if (typeof found === "string") return found;
        return format === "csv" ? String(Number(found.toPrecision(12))) : show(found);
      }),
      "",
    ];
  });
  return writeTable(format, [...columns, { heading: rows.some(({ fault }) => fault !== undefined) ? "status" : "", align: "left" }], cells);
}
