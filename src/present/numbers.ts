/**
 * The number itself.
 * @throws Error where it is none or endless: such a one is a fault of the program, and never printed as an answer
 */
export function finite(value: number, name = "a result"): number {
  if (Number.isFinite(value)) return value;
  throw new Error(`${name} is ${value}`);
}

/** A number with a fixed count of decimals; never "-0.00". */
export function fixed(value: number, decimals: number): string {
  finite(value);
  const text = value.toFixed(decimals);
  return /^-0(\.0*)?$/.test(text) ? text.slice(1) : text;
}

/** A number with a fixed count of significant digits, without exponent where it is of everyday size. */
export function significant(value: number, digits: number): string {
  if (finite(value) === 0) return "0";
  // The size of what is printed: 9.9996 to four digits is 10.00.
  const size = Math.floor(Math.log10(Math.abs(Number(value.toPrecision(digits)))));
  if (size < -4 || size > 8) return value.toExponential(digits - 1);
  return fixed(value, Math.max(0, digits - 1 - size));
}

/** A fraction as a percentage. */
export function percent(value: number, decimals = 1): string {
  return `${fixed(value * 100, decimals)} %`;
}

/** A number for a spreadsheet: all its digits, less the noise of the last ones. */
export function fullDigits(value: number): string {
  return String(Number(finite(value).toPrecision(12)));
}

/** Kelvin. */
export function kelvin(value: number): string {
  return `${fixed(value, 2)} K`;
}

/** Watts, in kW from 10 kW. */
export function watts(value: number): string {
  return Math.abs(value) >= 1e4 ? `${significant(value / 1e3, 4)} kW` : `${significant(value, 4)} W`;
}

/** Pascals as bar. */
export function bars(value: number): string {
  return `${significant(value / 1e5, 4)} bar`;
}
