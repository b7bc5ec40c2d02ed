/** What a value measures. The cycle file's units are looked up by it. */
export type Dimension =
  | "fraction"
  | "count"
  | "temperature"
  | "temperature difference"
  | "pressure"
  | "pressure difference"
  | "power"
  | "conductance"
  | "volume"
  | "specific enthalpy"
  | "mass flow";

/** A key whose value is a number with a unit, or a bare fraction or count. */
export interface NumberKey {
  readonly type: "number";
  readonly name: string;
  readonly dimension: Dimension;
  /** Lowest and highest legal value in SI units; an open end excludes the bound itself. */
  readonly range: { readonly lowest?: number; readonly highest?: number; readonly open?: "lowest" | "highest" | "both" };
  readonly help: string;
  readonly default?: number;
  /** Keys that share an alternative's name exclude one another. */
  readonly alternative?: string;
  /** The side that the key belongs to; left out, it may stand on any. */
  readonly side?: string;
  readonly required?: boolean;
}

/** A key that is true or false. */
export interface FlagKey {
  readonly type: "flag";
  readonly name: string;
  readonly help: string;
  readonly default: boolean;
  readonly side?: string;
}

/** A key that names another block, of the kind given. */
export interface BlockKey {
  readonly type: "block";
  readonly name: string;
  readonly kind: string;
  readonly help: string;
  readonly side?: string;
}

/** A key that names a branch, or one of a few words with a meaning of their own. */
export interface BranchKey {
  readonly type: "branch";
  readonly name: string;
  readonly words: readonly string[];
  readonly help: string;
  readonly required: true;
  readonly side?: string;
}

export type Key = NumberKey | FlagKey | BlockKey | BranchKey;

/** A group of keys of which exactly one must be given (or at most one, where `optional`). */
export interface Alternative {
  readonly name: string;
  readonly optional?: boolean;
  readonly side?: string;
}

/** A figure that a kind reports of a solved block, so that tables can print it without knowing the kind. */
export interface Figure {
  /** Its name in the JSON result, camelCase. */
  readonly name: string;
  readonly label: string;
  /** "none" for a bare number, "text" for words, "profile" for an exchanger's list of profile points. */
  readonly dimension: Dimension | "temperature list" | "none" | "none list" | "text" | "profile";
}
