import type { MeltingCurve } from "./fluid-data.js";
import { bracketedRoot } from "./root.js";

/**
 * K below the melting curve to which liquid is still given: so far it is a supercooled liquid, which the equation of state
 * describes, and the triple temperature may be used at any pressure of a small machine.
 */
const SUPERCOOLING = 1;

/** The limit that freezing sets to the liquid's pressure and temperature. */
export class MeltingLimit {
  /** Pa, up to which the lowest temperature of the range is the only limit. */
  readonly free: number;

  constructor(
    private readonly curve: MeltingCurve | undefined,
    private readonly lowest: number,
    private readonly highestPressure: number,
  ) {
    this.free = curve === undefined ? Infinity : this.pressure(lowest);
  }

  /** Highest pressure (Pa) at a temperature (K). */
  pressure(temperature: number): number {
    const { curve } = this;
    if (curve === undefined) return Infinity;
    const ratio = (temperature + SUPERCOOLING) / curve.referenceTemperature;
    let sum = 0;
    if (curve.kind === "powers") {
      for (const [n, t] of curve.terms) sum += n * (ratio ** t - 1);
      return curve.referencePressure * (1 + sum);
    }
    for (const [n, t] of curve.terms) sum += n * (ratio - 1) ** t;
    return curve.referencePressure * Math.exp(sum);
  }

  /** Lowest temperature (K) at a pressure (Pa). */
  temperature(pressure: number): number {
    if (pressure <= this.free) return this.lowest;
    let high = 2 * this.lowest;
    while (this.pressure(high) < this.highestPressure * 2) high *= 2;
    return bracketedRoot((temperature) => this.pressure(temperature) - pressure, this.lowest, high);
  }
}
