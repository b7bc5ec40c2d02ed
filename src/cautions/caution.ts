import type { Caution, SteadyState } from "../cycle/result.js";

/** A hazard: one record says when it applies and with which figures. */
export interface CautionRecord {
  /** Stable, kebab-case. */
  readonly code: string;
  readonly title: string;
  /** What triggers it, in one clause for the documentation. */
  readonly trigger: string;
  /** The hazard's text and the figures (SI) behind it for a machine; null where it does not apply. */
  assess(result: SteadyState): Pick<Caution, "text" | "figures"> | null;
}
