/** Something the user should know about a result that is right all the same. */
export interface Warning {
  readonly code: string;
  readonly block: string | null;
  readonly message: string;
}

/** Heat that crosses a block's boundary. */
export interface HeatFlow {
  /** W, positive into the gas */
  readonly heat: number;
  /**
   * K, temperature at which it crosses: the surroundings' for a leak or a rejection; for a load, the mean at which
   * the gas takes it up, so that a load destroys no exergy of its own.
   */
  readonly temperature: number;
}

/** Energy that crosses a block's boundary, for the audits and the machine's totals. */
export interface EnergyFlows {
  /** W into the gas; negative where the gas does work */
  readonly work: number;
  /** W that motors, or an outside refrigerator, take from outside for this block */
  readonly drive: number;
  readonly heat: readonly HeatFlow[];
  /** W of the work that comes from expanders on the same shaft. */
  readonly recovered?: number;
  /** W of the work done that drives another block. */
  readonly delivered?: number;
  /** What the power that goes neither into the gas nor to another block is lost in: "drive", "brake"; left out, the block itself. */
  readonly lostIn?: string;
}

/** A block in its place, with its numbers ready. */
export interface Unit {
  readonly name: string;
  readonly kind: string;
  /** Sets the outlets' enthalpies from the inlets'. Throws an OutOfRangeError or an Infeasible when it cannot. */
  evaluate(): void;
  /** Called once the cycle has converged. */
  energyFlows(): EnergyFlows;
  /** The block's own figures in SI units. */
  figures(): Readonly<Record<string, unknown>>;
  /** W at the shaft, of a block that drives another, as of the last evaluation. */
  shaftPower?(): number;
  /** The refrigeration taken up, of a block that is a load. */
  refrigeration?(): Refrigeration;
  /** Why the converged state is no machine that can exist, where it is none: heat that would have to flow backwards. */
  impossible?(): Impossibility | null;
  warnings?(): readonly Warning[];
}

/** What makes a block's converged state impossible. */
export interface Impossibility {
  readonly quantity: string;
  /** One sentence with the figures. */
  readonly reason: string;
  /** What to change, one sentence. */
  readonly advice: string;
}

/** Refrigeration taken up at a load. */
export interface Refrigeration {
  /** W */
  readonly heat: number;
  /** K */
  readonly inletTemperature: number;
  /** K */
  readonly outletTemperature: number;
}
