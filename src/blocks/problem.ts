import type { BlockDefinition } from "./definition.js";

/**
 * Something wrong in a definition, said without knowing which file it came from:
 * the cycle-file reader adds file, line and column.
 */
export interface Problem {
  /** Stable, kebab-case: "pressure-rises". */
  readonly code: string;
  /** The entry it concerns, by identity; left out when it concerns the whole cycle. */
  readonly entry?: BlockDefinition;
  /** The key it concerns; left out when it concerns the entry (or, without an entry, a key of the file's top level). */
  readonly key?: string;
  readonly found: string;
  readonly expected: string;
}
