import { finite } from "./numbers.js";

/**
 * A result as JSON: SI units, every digit.
 * @throws Error where a number is not finite, which JSON would silently write as null
 */
export function jsonText(result: unknown): string {
  return JSON.stringify(result, (key, value: unknown) => (typeof value === "number" ? finite(value, key) : value), 2);
}
