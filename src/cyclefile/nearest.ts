import { distance } from "fastest-levenshtein";

/** Letters from which on a beginning counts as an abbreviation. */
const ABBREVIATION = 3;
/** Letters up to which a name is looked for: nobody mistypes longer ones, and comparing them takes long. */
const LONGEST_NAME = 64;

/** The known name that a misspelt or shortened one most likely means; undefined where none is near. */
export function nearest(name: string, known: Iterable<string>): string | undefined {
  const wanted = name.toLowerCase();
  if (wanted.length > LONGEST_NAME) return undefined;
  let best: string | undefined;
  // Two wrong letters in five, so that of one letter or two only the case may differ: x does not mean %.
  let least = Math.floor(0.4 * wanted.length) + 1;
  let abbreviated: string | undefined;
  for (const candidate of known) {
    const lower = candidate.toLowerCase();
    const apart = Math.abs(lower.length - wanted.length) < least ? edits(wanted, lower) : Infinity;
    if (apart < least) [best, least] = [candidate, apart];
    if (wanted.length >= ABBREVIATION && lower.startsWith(wanted)) abbreviated ??= candidate;
  }
  return best ?? abbreviated;
}

/** Letters to be added, left out or replaced to make one name of another; two neighbours in each other's place count as one. */
function edits(from: string, to: string): number {
  let least = distance(from, to);
  for (let i = 1; i < from.length && least > 1; i++) {
    if (from[i - 1] !== from[i]) least = Math.min(least, 1 + distance(from.slice(0, i - 1) + from[i] + from[i - 1] + from.slice(i + 1), to));
  }
  return least;
}

/** `{ suggestion }` where there is one, to be spread into a problem. */
export function suggested(suggestion: string | undefined): { suggestion?: string } {
  return suggestion === undefined ? {} : { suggestion };
}
