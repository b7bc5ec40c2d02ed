/** The two constants of the Peng-Robinson equation, and those of its integral. */
const OMEGA_A = 0.45724;
const OMEGA_B = 0.0778;
const ROOT_2 = Math.SQRT2;

/**
 * The Peng-Robinson equation (Ind. Eng. Chem. Fundam. 15 (1976) 59), for starting values above the critical pressure or
 * temperature: within some per cent from ideal gas to dense fluid, at the cost of a few roots.
 */
export class CubicGuess {
  /** Enthalpy less the ideal gas's at the same temperature, J/kg, at the last `departures`. */
  enthalpyDeparture = NaN;
  /** Entropy less the ideal gas's at the same temperature and pressure, J/(kg K). */
  entropyDeparture = NaN;

  private readonly slope: number;
  // a and b over R T / p, at the last `compressibility`.
  private a = NaN;
  private b = NaN;

  constructor(
    private readonly criticalTemperature: number,
    private readonly criticalPressure: number,
    private readonly specificGasConstant: number,
    acentricFactor: number,
  ) {
    this.slope = 0.37464 + acentricFactor * (1.54226 - 0.26992 * acentricFactor);
  }

  /** kg/m3 */
  density(temperature: number, pressure: number): number {
    return pressure / (this.compressibility(temperature, pressure) * this.specificGasConstant * temperature);
  }

  /** Leaves the departures from the ideal gas at a temperature and pressure. */
  departures(temperature: number, pressure: number): void {
    const z = this.compressibility(temperature, pressure);
    const { a, b } = this;
    const logarithm = Math.log((z + (1 + ROOT_2) * b) / (z + (1 - ROOT_2) * b)) / (2 * ROOT_2 * b);
    const reduced = Math.sqrt(temperature / this.criticalTemperature);
    // T a'(T) / a = -slope sqrt(T / Tc) / (1 + slope (1 - sqrt(T / Tc)))
    const steepness = (-this.slope * reduced) / Math.max(0.1, 1 + this.slope * (1 - reduced));
    this.enthalpyDeparture = this.specificGasConstant * temperature * (z - 1 + a * (steepness - 1) * logarithm);
    this.entropyDeparture = this.specificGasConstant * (Math.log(Math.max(1e-3, z - b)) + a * steepness * logarithm);
  }

  private compressibility(temperature: number, pressure: number): number {
    const reduced = temperature / this.criticalTemperature;
    const ratio = pressure / (this.criticalPressure * reduced);
    const root = Math.max(0, 1 + this.slope * (1 - Math.sqrt(reduced)));
    const a = (OMEGA_A * root * root * ratio) / reduced;
    const b = OMEGA_B * ratio;
    this.a = a;
    this.b = b;
    // Z^3 + c2 Z^2 + c1 Z + c0 = 0: one real root above the critical point
    const c2 = b - 1;
    const c1 = a - b * (2 + 3 * b);
    const c0 = -b * (a - b - b * b);
    const third = c2 / 3;
    const p = c1 / 3 - third * third;
    const q = third * third * third - 0.5 * (third * c1 - c0);
    const discriminant = q * q + p * p * p;
    if (discriminant >= 0) {
      const square = Math.sqrt(discriminant);
      return Math.cbrt(square - q) - Math.cbrt(square + q) - third;
    }
    // Of three the largest, a gas's; above the critical pressure the others are less than b and no densities.
    return 2 * Math.sqrt(-p) * Math.cos(Math.acos(q / (p * Math.sqrt(-p))) / 3) - third;
  }
}
