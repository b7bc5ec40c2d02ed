import { InputError } from "../cyclefile/errors.js";
import { MOST_POINTS } from "../studies/sweep.js";
import { optionText, type Input } from "./command.js";

/**
 * The text of an option that a command cannot do without.
 * @throws InputError
 */
export function requiredOption(input: Input, name: string, expected: string): string {
  const text = optionText(input, name);
  if (text !== undefined && text !== "") return text;
  throw optionFault(name, "", expected);
}

/** The points of each range, from --steps "26" or "13,9"; one number serves for all. */
export function stepsOf(text: string | undefined, defaults: readonly number[]): number[] {
  if (text === undefined) return [...defaults];
  const numbers = text.split(",").map((each) => (/^\s*\d+\s*$/.test(each) ? Number(each) : NaN));
  if (numbers.length > defaults.length || numbers.some((each) => !(each >= 2 && each <= MOST_POINTS))) {
    throw optionFault("steps", text, defaults.length === 1 ? `a whole number from 2 to ${MOST_POINTS}` : `whole numbers from 2 to ${MOST_POINTS}, as in 26 or 13,9`);
  }
  return defaults.map((_, i) => numbers[Math.min(i, numbers.length - 1)]);
}

/** A fault of an option, in the form of all faults of the input. */
export function optionFault(name: string, text: string, expected: string): InputError {
  return new InputError([{ code: "option", place: `--${name}${text === "" ? "" : ` ${text}`}`, line: 0, column: 0, found: text === "" ? "nothing given" : `"${text}"`, expected }]);
}
