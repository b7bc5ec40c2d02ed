/** A value of a block's key, in SI units where it is a number. */
export type Value = number | string | boolean;

/** One entry of the loop or of a branch, read and checked, with every value in SI units. */
export interface BlockDefinition {
  /** The block kind, as the cycle file writes it: "expander". */
  readonly kind: string;
  readonly name: string;
  /** The side that this entry is, where the kind stands in the loop once a side. */
  readonly side?: string;
  /** Values by key, kebab-case as in the cycle file; defaults are filled in. */
  readonly values: Readonly<Record<string, Value>>;
}

/** The number given under a key, or undefined where the key was left out. */
export function given(definition: BlockDefinition, key: string): number | undefined {
  const value = definition.values[key];
  return typeof value === "number" ? value : undefined;
}

/**
 * The number given under a key that the kind's key records promise.
 * @throws Error when the key is missing, which is a fault of the program and not of the user's file.
 */
export function required(definition: BlockDefinition, key: string): number {
  const value = definition.values[key];
  if (typeof value !== "number") throw new Error(`${definition.name}: ${key} should have been checked`);
  return value;
}
