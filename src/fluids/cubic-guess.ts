/** Root of acos' argument range and of the cubic's depressed form: the customary constants of this equation. */
const OMEGA_A = 0.45724;
const OMEGA_B = 0.0778;

/**
 * Density (kg/m3) by the Peng-Robinson equation (Ind. Eng. Chem. Fundam. 15 (1976) 59), for starting values above the
 * critical temperature: within some per cent from ideal gas to dense fluid, at the cost of a few square roots.
 */
export class CubicGuess {
  private readonly slope: number;

  constructor(
    private readonly criticalTemperature: number,
    private readonly criticalPressure: number,
    private readonly specificGasConstant: number,
    acentricFactor: number,
  ) {
    this.slope = 0.37464 + acentricFactor * (1.54226 - 0.26992 * acentricFactor);
  }

  density(temperature: number, pressure: number): number {
    const reduced = temperature / this.criticalTemperature;
    const ratio = pressure / (this.criticalPressure * reduced);
    const root = Math.max(0, 1 + this.slope * (1 - Math.sqrt(reduced)));
    const a = (OMEGA_A * root * root * ratio) / reduced;
    const b = OMEGA_B * ratio;
    // Z^3 + c2 Z^2 + c1 Z + c0 = 0, one real root above the critical temperature; below it the largest is taken
    const c2 = b - 1;
    const c1 = a - b * (2 + 3 * b);
    const c0 = -b * (a - b - b * b);
    const third = c2 / 3;
    const p = c1 / 3 - third * third;
    const q = third * third * third - 0.5 * (third * c1 - c0);
    const discriminant = q * q + p * p * p;
    let z: number;
    if (discriminant >= 0) {
      const square = Math.sqrt(discriminant);
      z = Math.cbrt(square - q) - Math.cbrt(square + q) - third;
    } else {
      z = 2 * Math.sqrt(-p) * Math.cos(Math.acos(q / (p * Math.sqrt(-p))) / 3) - third;
    }
    return pressure / (z * this.specificGasConstant * temperature);
  }
}
