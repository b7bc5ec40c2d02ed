import { distance } from "fastest-levenshtein";

/** The known name that a misspelt one most likely means; undefined where none is near. */
export function nearest(name: string, known: Iterable<string>): string | undefined {
  let best: string | undefined;
  let least = Math.max(1, Math.floor(name.length / 2)) + 1;
  for (const candidate of known) {
    const apart = distance(name.toLowerCase(), candidate.toLowerCase());
    if (apart < least) [best, least] = [candidate, apart];
  }
  return best;
}
