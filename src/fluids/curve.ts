import type { CurveTerms } from "./fluid-data.js";
import { chebyshevNodes, Interpolant } from "./polynomial.js";

/** Share of the logarithm of pressure left when an inversion has settled: the next Newton step is below round-off. */
const SETTLED = 1e-9;
/** Steps of an inversion; it takes 2 to 4. */
const MOST_STEPS = 60;
/** K, the narrowest bracket that still divides. */
const NARROWEST = 1e-13;
/** Points of the curve from which its inverse is guessed. */
const GUESS_POINTS = 6;

/**
 * A pressure curve ln(p / p_end) = (T_end / T) sum n (1 - T / T_end)^k along a phase boundary, both ways.
 * Exponents are multiples of one half, so that powers are products of the square root.
 */
export class PressureCurve {
  private readonly n: Float64Array;
  /** Twice the exponents. */
  private readonly halves: Int32Array;
  private readonly powers: Float64Array;
  /** d ln p / d T at the last `logarithm`. */
  private slope = NaN;
  private guess: Interpolant | undefined;

  constructor(
    terms: CurveTerms,
    private readonly endTemperature: number,
    private readonly endPressure: number,
    /** K; an inversion looks for temperatures from here */
    private readonly lowest: number,
    /** K, to here: so far the curve rises */
    readonly highest: number,
  ) {
    this.n = Float64Array.from(terms, ([n]) => n);
    this.halves = Int32Array.from(terms, ([, k]) => 2 * k);
    this.powers = new Float64Array(Math.max(...this.halves) + 1);
  }

  /** Pa */
  pressure(temperature: number): number {
    return this.endPressure * Math.exp(this.logarithm(temperature));
  }

  /** ln(p / endPressure); leaves its temperature slope. */
  private logarithm(temperature: number): number {
    const { n, halves, powers, endTemperature } = this;
    const theta = Math.max(0, 1 - temperature / endTemperature);
    const root = Math.sqrt(theta);
    let x = 1;
    for (let i = 0; i < powers.length; i++) {
      powers[i] = x;
      x *= root;
    }
    let sum = 0;
    let weighted = 0;
    for (let i = 0; i < n.length; i++) {
      const term = n[i] * powers[halves[i]];
      sum += term;
      weighted += term * halves[i];
    }
    const ratio = endTemperature / temperature;
    // d(sum)/dT = -(1/T_end) sum n k theta^(k-1)
    this.slope = -(ratio * sum) / temperature - (0.5 * weighted) / (theta * temperature);
    return ratio * sum;
  }

  /** K, roughly, at a pressure (Pa) that the curve passes. */
  roughTemperature(pressure: number): number {
    if (this.guess === undefined) {
      const temperatures = chebyshevNodes(this.lowest, this.highest, GUESS_POINTS);
      this.guess = new Interpolant(
        temperatures.map((temperature) => this.logarithm(temperature)),
        temperatures.map((temperature) => 1 / temperature),
      );
    }
    return 1 / this.guess.at(Math.log(pressure / this.endPressure));
  }

  /** K, at a pressure (Pa) that the curve passes. */
  temperature(pressure: number): number {
    const wanted = Math.log(pressure / this.endPressure);
    const guess = this.roughTemperature(pressure);
    let { lowest: low, highest: high } = this;
    let temperature = guess > low && guess < high ? guess : 0.5 * (low + high);
    for (let i = 0; i < MOST_STEPS; i++) {
      const miss = wanted - this.logarithm(temperature);
      if (miss > 0) low = temperature;
      else high = temperature;
      // In 1/T the curve is nearly straight.
      const step = miss / (this.slope * temperature);
      const next = temperature / (1 - step);
      if (Math.abs(miss) <= SETTLED && next <= this.highest) return next;
      temperature = next > low && next < high ? next : 0.5 * (low + high);
      if (high - low <= NARROWEST) return temperature;
    }
    return temperature;
  }
}
