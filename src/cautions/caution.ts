import type { Caution, SteadyState, WithMoisture } from "../cycle/result.js";

/** A solved machine, as far as hazards look at it; without its moisture where nobody has asked for it. */
export type Assessable = SteadyState & Partial<Pick<WithMoisture, "moisture">>;

/** A hazard: one record says when it applies and with which figures. */
export interface CautionRecord {
  /** Stable, kebab-case. */
  readonly code: string;
  readonly title: string;
  /** What triggers it, in one clause for the documentation. */
  readonly trigger: string;
  /** The hazard's text and the figures (SI) behind it for a machine; null where it does not apply. */
  assess(result: Assessable): Pick<Caution, "text" | "figures"> | null;
}
