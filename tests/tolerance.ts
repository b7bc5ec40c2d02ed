import { expect } from "vitest";

/**
 * Compares with what was expected, relative to it.
 *
 * @param what the row and the quantity, for the message
 * @param floor the expected value counts as at least this large: for quantities with an arbitrary zero
 */
export function expectClose(what: string, got: number, expected: number, tolerance: number, floor = 0): void {
  const error = Math.abs(got - expected) / Math.max(Math.abs(expected), floor);
  if (error <= tolerance) return;
  expect.fail(`${what}: got ${got}, expected ${expected}, relative error ${error.toExponential(2)} > ${tolerance}`);
}

/** Compares with a printed value: within `units` of its last digit. */
export function expectPrinted(what: string, got: number, printed: string, units = 1): void {
  const [mantissa = "", exponent = "0"] = printed.split("e");
  const decimals = (mantissa.split(".")[1] ?? "").length;
  const last = 10 ** (Number(exponent) - decimals);
  // A hair more, for the printed value's own binary representation.
  if (Math.abs(got - Number(printed)) <= units * last * (1 + 1e-9)) return;
  expect.fail(`${what}: got ${got}, printed ${printed}`);
}
