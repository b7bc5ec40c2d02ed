import type { Warning } from "../blocks/unit.js";
import type { Phase } from "../fluids/state.js";
import type { Moisture } from "./moisture-result.js";

/** One state point of the solved cycle. */
export interface Station {
  /** 1 at the first block's outlet, counted as the gas flows (an open circuit's intake is station 0). */
  readonly station: number;
  /** The block that the gas has just left, for an exchanger with its side: "HX1 warm"; "intake" for an open circuit's start. */
  readonly after: string;
  /** K */
  readonly temperature: number;
  /** Pa */
  readonly pressure: number;
  /** J/kg */
  readonly enthalpy: number;
  /** J/(kg K) */
  readonly entropy: number;
  /** kg/m3 */
  readonly density: number;
  /** kg/kg; null above the critical pressure, where it has no meaning */
  readonly vapourFraction: number | null;
  readonly phase: Phase;
  /**
   * Oxygen in the liquid, mol/mol, of a wet station through which gas of air's composition flows, in equilibrium; null elsewhere, for
   * other fluids, near the critical pressure, and where it was not asked for.
   */
  readonly liquidOxygen: number | null;
  /** The same of the vapour. */
  readonly vapourOxygen: number | null;
  /** kg/s */
  readonly massFlow: number;
  /** J/kg, over the surroundings' state */
  readonly exergy: number;
}

/** Heat taken up at one load. */
export interface LoadResult {
  readonly name: string;
  /** W */
  readonly heat: number;
  /** K */
  readonly inletTemperature: number;
  /** K */
  readonly outletTemperature: number;
}

/** One point of an exchanger's temperature profile, from its warm end to its cold end. */
export interface ProfilePoint {
  /** Duty between the warm end and this point over the whole duty. */
  readonly dutyFraction: number;
  /** K */
  readonly warmTemperature: number;
  /** K */
  readonly coldTemperature: number;
}

/** A block's own figures: name and kind, and whatever its kind reports, in SI units. */
export interface BlockResult {
  readonly name: string;
  readonly kind: string;
  readonly [figure: string]: unknown;
}

/** What would make the machine liquefy. */
export interface Liquefaction {
  readonly reached: boolean;
  /** J/kg, enthalpy over the dew point's where it is smallest; negative once liquid forms. Null where no station can condense. */
  readonly margin: number | null;
  /** The station's `after`. */
  readonly where: string | null;
  /** What `required` is a value of: "every expander's efficiency" or "T1.efficiency". */
  readonly parameter: string;
  /** Smallest isentropic efficiency at which liquid begins to form; null with a reason where even 100 % does not do. */
  readonly required: number | null;
  readonly reason: string | null;
  /** The efficiency in the file; null where the expanders differ. */
  readonly given: number | null;
}

/** The converged steady state, SI units throughout. */
export interface SteadyState {
  readonly title: string;
  readonly fluid: string;
  readonly circuit: "closed" | "open";
  readonly converged: true;
  readonly solver: {
    readonly iterations: number;
    /** Largest imbalance of any block over the largest energy flow. */
    readonly residual: number;
    /** True where a colder steady state exists too: the warmest is the one reported. */
    readonly otherSteadyStates: boolean;
  };
  readonly surroundings: { readonly temperature: number; readonly pressure: number; readonly relativeHumidity: number };
  readonly massFlow: number;
  readonly coldEnd: { readonly temperature: number; readonly station: number };
  readonly refrigeration: { readonly capacity: number; readonly loads: readonly LoadResult[] };
  /** W, all positive */
  readonly power: {
    /** into the gas, all compressors */
    readonly compression: number;
    /** what the motors take from outside */
    readonly drive: number;
    /** out of the gas, all expanders */
    readonly expansion: number;
    /** what driven compressors take from expanders */
    readonly recovered: number;
    /** all power bought from outside: drives, and any refrigeration bought */
    readonly net: number;
  };
  readonly performance: {
    /** capacity over net power; null without a load */
    readonly cop: number | null;
    /** of a reversible refrigerator between the surroundings and the loads' temperatures */
    readonly carnotCop: number | null;
    readonly secondLawEfficiency: number | null;
  };
  /**
   * What is drawn, or else the liquid carried by the wettest station. The oxygen in a draw is that of the liquid separated in an open
   * circuit; in a closed one it is air's, for in the steady state the draw carries away what the make-up brings in.
   */
  readonly liquid: { /** The station's `after`, or "product". */ readonly where: string; readonly massFlow: number; readonly fractionOfFlow: number; readonly oxygenMoleFraction: number | null } | null;
  readonly liquefaction: Liquefaction;
  readonly stations: readonly Station[];
  readonly blocks: readonly BlockResult[];
  readonly audit: { readonly energy: number; readonly exergy: number };
  /** W destroyed in each block, and its share of the whole */
  readonly exergy: readonly { readonly block: string; readonly destroyed: number; readonly share: number }[];
  readonly warnings: readonly Warning[];
}

export interface Caution {
  readonly code: string;
  readonly title: string;
  readonly text: string;
  /** The figures that trigger it, SI units. */
  readonly figures: Readonly<Record<string, number>>;
}

/** The steady state with what the gas brings in from the surroundings; null for a fluid that is not taken from there. */
export interface WithMoisture extends SteadyState {
  readonly moisture: Moisture | null;
}

/** What every output shows: the steady state and the hazards computed from it. */
export interface CycleResult extends WithMoisture {
  readonly cautions: readonly Caution[];
}
