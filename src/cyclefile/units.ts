/** What a unit measures. Volumes of gas at different reference states are different things. */
export type UnitKind =
  | "fraction"
  | "temperature"
  | "pressure"
  | "mass flow"
  | "molar flow"
  | "normal volume flow"
  | "standard volume flow"
  | "volume flow"
  | "power"
  | "conductance"
  | "volume"
  | "length"
  | "specific enthalpy"
  | "specific entropy"
  | "density";

/** A unit: SI value = number x factor + offset. */
export interface Unit {
  readonly kind: UnitKind;
  readonly factor: number;
  readonly offset?: number;
  /** Counted from the surroundings' pressure. */
  readonly gauge?: true;
}

// Exact by definition where not noted: pound 0.45359237 kg, foot 0.3048 m, standard gravity 9.80665 m/s2 (NIST SP 811).
const POUND = 0.45359237;
const CUBIC_FOOT = 0.3048 ** 3;
const PSI = (POUND * 9.80665) / 0.0254 ** 2;
const MINUTE = 60;
const HOUR = 3600;

/** Every unit there is, by the name that a cycle file writes. */
export const units: Readonly<Record<string, Unit>> = {
  "%": { kind: "fraction", factor: 0.01 },
  ppm: { kind: "fraction", factor: 1e-6 },

  K: { kind: "temperature", factor: 1 },
  degC: { kind: "temperature", factor: 1, offset: 273.15 },
  degF: { kind: "temperature", factor: 5 / 9, offset: 459.67 * (5 / 9) },
  degR: { kind: "temperature", factor: 5 / 9, offset: 0 },

  Pa: { kind: "pressure", factor: 1 },
  hPa: { kind: "pressure", factor: 100 },
  kPa: { kind: "pressure", factor: 1e3 },
  MPa: { kind: "pressure", factor: 1e6 },
  bar: { kind: "pressure", factor: 1e5 },
  mbar: { kind: "pressure", factor: 100 },
  psi: { kind: "pressure", factor: PSI },
  atm: { kind: "pressure", factor: 101325 },
  torr: { kind: "pressure", factor: 101325 / 760 },
  mmHg: { kind: "pressure", factor: 133.322387415 },
  barg: { kind: "pressure", factor: 1e5, gauge: true },
  psig: { kind: "pressure", factor: PSI, gauge: true },
  kPag: { kind: "pressure", factor: 1e3, gauge: true },

  "kg/s": { kind: "mass flow", factor: 1 },
  "g/s": { kind: "mass flow", factor: 1e-3 },
  "kg/min": { kind: "mass flow", factor: 1 / MINUTE },
  "g/min": { kind: "mass flow", factor: 1e-3 / MINUTE },
  "kg/h": { kind: "mass flow", factor: 1 / HOUR },
  "lb/min": { kind: "mass flow", factor: POUND / MINUTE },
  "lb/h": { kind: "mass flow", factor: POUND / HOUR },
  "mol/s": { kind: "molar flow", factor: 1 },
  "mol/h": { kind: "molar flow", factor: 1 / HOUR },
  "kmol/h": { kind: "molar flow", factor: 1e3 / HOUR },

  "Nm3/h": { kind: "normal volume flow", factor: 1 / HOUR },
  "Nm3/min": { kind: "normal volume flow", factor: 1 / MINUTE },
  "NL/min": { kind: "normal volume flow", factor: 1e-3 / MINUTE },
  "NL/s": { kind: "normal volume flow", factor: 1e-3 },
  scfm: { kind: "standard volume flow", factor: CUBIC_FOOT / MINUTE },
  scfh: { kind: "standard volume flow", factor: CUBIC_FOOT / HOUR },
  "m3/s": { kind: "volume flow", factor: 1 },
  "m3/min": { kind: "volume flow", factor: 1 / MINUTE },
  "m3/h": { kind: "volume flow", factor: 1 / HOUR },
  "L/s": { kind: "volume flow", factor: 1e-3 },
  "L/min": { kind: "volume flow", factor: 1e-3 / MINUTE },
  "L/h": { kind: "volume flow", factor: 1e-3 / HOUR },
  cfm: { kind: "volume flow", factor: CUBIC_FOOT / MINUTE },

  W: { kind: "power", factor: 1 },
  mW: { kind: "power", factor: 1e-3 },
  kW: { kind: "power", factor: 1e3 },
  "W/K": { kind: "conductance", factor: 1 },
  "kW/K": { kind: "conductance", factor: 1e3 },

  m3: { kind: "volume", factor: 1 },
  L: { kind: "volume", factor: 1e-3 },
  mL: { kind: "volume", factor: 1e-6 },
  cm3: { kind: "volume", factor: 1e-6 },
  m: { kind: "length", factor: 1 },
  cm: { kind: "length", factor: 1e-2 },
  mm: { kind: "length", factor: 1e-3 },

  "J/kg": { kind: "specific enthalpy", factor: 1 },
  "kJ/kg": { kind: "specific enthalpy", factor: 1e3 },
  "J/(kg K)": { kind: "specific entropy", factor: 1 },
  "kJ/(kg K)": { kind: "specific entropy", factor: 1e3 },
  "kg/m3": { kind: "density", factor: 1 },
  "g/L": { kind: "density", factor: 1 },
};

/** The names of the units of some kinds, in the order of the table. */
export function unitNames(kinds: readonly UnitKind[], { gauge = true }: { gauge?: boolean } = {}): string[] {
  return Object.keys(units).filter((name) => kinds.includes(units[name].kind) && (gauge || units[name].gauge !== true));
}

/** A number of a unit in SI units. */
export function toSI(value: number, { factor, offset = 0, gauge }: Unit, surroundingsPressure: number): number {
  return value * factor + offset + (gauge === true ? surroundingsPressure : 0);
}

/** An SI value in a unit. */
export function fromSI(value: number, { factor, offset = 0, gauge }: Unit, surroundingsPressure: number): number {
  return (value - offset - (gauge === true ? surroundingsPressure : 0)) / factor;
}
