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

/** Problems shown one by one; a file with more of them is of another kind altogether. */
const MOST_SHOWN = 100;

/** Everything wrong with the input at once, in the order of the file. */
export class InputError extends Error {
  override readonly name = "InputError";

  constructor(readonly problems: readonly LocatedProblem[]) {
    const lines = problems.slice(0, MOST_SHOWN).map(describe);
    if (problems.length > MOST_SHOWN) lines.push(`… and ${problems.length - MOST_SHOWN} more`);
    super(lines.join("\n"));
  }
}

/** One line: place, what was found, and the name that was meant or else what was expected. */
export function describe({ place, found, expected, suggestion }: LocatedProblem): string {
  return `${place}: ${found}; ${suggestion === undefined ? `expected ${expected}` : `did you mean "${suggestion}"?`}`;
}

/** Problems in the order of their places, each said once. */
export function inOrder(problems: readonly LocatedProblem[]): LocatedProblem[] {
  const seen = new Set<string>();
  return problems
    .toSorted((a, b) => a.line - b.line || a.column - b.column)
    .filter(({ place, found }) => !seen.has(`${place} ${found}`) && seen.add(`${place} ${found}`));
}
