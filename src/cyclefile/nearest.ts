import { distance } from "fastest-levenshtein";

/** Letters from which on a beginning counts as an abbreviation. */
const ABBREVIATION = 3;

/** The known name that a misspelt or shortened one most likely means; undefined where none is near. */
export function nearest(name: string, known: Iterable<string>): string | undefined {
  const wanted = name.toLowerCase();
  let best: string | undefined;
  // One wrong letter in three.
  let least = Math.ceil(wanted.length / 3) + 1;
  let abbreviated: string | undefined;
  for (const candidate of known) {
    const apart = distance(wanted, candidate.toLowerCase());
    if (apart < least) [best, least] = [candidate, apart];
    if (wanted.length >= ABBREVIATION && candidate.toLowerCase().startsWith(wanted)) abbreviated ??= candidate;
  }
  return best ?? abbreviated;
}

/** `{ suggestion }` where there is one, to be spread into a problem. */
export function suggested(suggestion: string | undefined): { suggestion?: string } {
  return suggestion === undefined ? {} : { suggestion };
}
