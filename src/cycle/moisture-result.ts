import type { Contents } from "../fluids/moist-air.js";

/** What can freeze out of air. */
export type Substance = "water" | "carbonDioxide";

/** An amount that leaves the gas. */
export interface Amount {
  /** kg/s while the machine runs as solved; null for the first fill, which comes once. */
  readonly rate: number | null;
  /** kg per kg of fresh air that comes in */
  readonly perFreshAir: number;
}

/** A place along a block's passage. */
export interface Place {
  /** Share of the duty from the warm end of an exchanger; null for a block without a profile. */
  readonly dutyFraction: number | null;
  /** K; in a block without a profile on a straight line of temperature and pressure from inlet to outlet */
  readonly temperature: number;
}

/** Water taken out on purpose. */
export interface Removal extends Amount {
  /** The block, and which intercooler where it has several: "C1 intercooler 1". */
  readonly at: string;
  readonly by: "trap" | "dryer";
  /** K */
  readonly temperature: number;
  /** Pa */
  readonly pressure: number;
}

/** Ice or carbon dioxide frost that collects in a block. */
export interface Deposit extends Amount {
  /** As a station's `after`: "HX1 warm". */
  readonly after: string;
  readonly block: string;
  readonly substance: Substance;
  /** Where the first of it settles. */
  readonly begins: Place;
  /** Where 99 % of what settles in the block has settled. */
  readonly ends: Place;
  /** kg/s (null for the first fill) of the water that comes there as liquid and freezes as the passage falls below 0 degC. */
  readonly arrivesLiquid: number | null;
}

/** How long an exchanger's passage takes to fill. */
export interface Filling {
  readonly after: string;
  readonly block: string;
  /** m3 */
  readonly passageVolume: number;
  /** Share of it whose filling is asked for. */
  readonly filled: number;
  /** s, with solid ice and solid carbon dioxide together; porous frost takes less */
  readonly time: number;
}

/** What the air of one station carries. */
export interface StationContents extends Contents {
  readonly station: number;
  readonly after: string;
  /** K: from here down its water condenses (above 273.16 K) or freezes; null without water */
  readonly dewPoint: number | null;
  /** K: from here down its carbon dioxide freezes; null without any */
  readonly frostPoint: number | null;
}

/** Water and carbon dioxide in a machine that takes in air, SI units, mol per mol of dry air. */
export interface Moisture {
  /** What brings them: fresh air all the time, what replaces the product, or the first fill of a closed circuit. */
  readonly source: "intake" | "make-up" | "first fill";
  /** As the air comes in from the surroundings. */
  readonly fresh: Contents;
  /** kg/s of fresh air; null for the first fill */
  readonly freshAir: number | null;
  /** What is left in the gas behind the last trap or dryer; null where there is none. */
  readonly left: (Contents & { readonly after: string; readonly pressureDewPoint: number | null; readonly waterClass: number | null }) | null;
  readonly removals: readonly Removal[];
  readonly stations: readonly StationContents[];
  readonly deposits: readonly Deposit[];
  readonly fillings: readonly Filling[];
}
