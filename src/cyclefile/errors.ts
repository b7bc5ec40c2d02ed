/** One thing wrong with the input, with its place. */
export interface LocatedProblem {
  /** Stable, kebab-case; docs/messages.md lists them. */
  readonly code: string;
  /** file:line:column, or the command-line setting it came from */
  readonly place: string;
  /** 1-based; 0 for a command-line setting */
  readonly line: number;
  readonly column: number;
  readonly found: string;
  readonly expected: string;
  /** The nearest known name, for a misspelt one. */
  readonly suggestion?: string;
}

/** Everything wrong with the input at once, in the order of the file. */
export class InputError extends Error {
  override readonly name = "InputError";

  constructor(readonly problems: readonly LocatedProblem[]) {
    super(problems.map(describe).join("\n"));
  }
}

/** One line: place, what was found, what was expected. */
export function describe({ place, found, expected, suggestion }: LocatedProblem): string {
  const hint = suggestion === undefined ? "" : `; did you mean "${suggestion}"?`;
  return `${place}: ${found}; expected ${expected}${hint}`;
}
