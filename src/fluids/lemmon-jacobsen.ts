import type { HelmholtzEquation } from "./helmholtz.js";
import type { State } from "./state.js";
import type { LemmonJacobsenData, TransportTerm } from "./transport-data.js";
import type { TransportModel } from "./transport-model.js";

/** Chapman-Enskog: viscosity in Pa s from sqrt(M T) / (sigma^2 Omega), M in g/mol, T in K, sigma in nm. */
const CHAPMAN_ENSKOG = 2.66958e-8;
/** ln(Omega) as a polynomial in ln(T k / epsilon), the same for all fluids of the paper. */
const COLLISION_INTEGRAL = [0.431, -0.4623, 0.08406, 0.005341, -0.00331];
/** J/K, as the paper used it */
const BOLTZMANN = 1.380658e-23;
/** Constants of the critical enhancement that the paper takes for all fluids. */
const R0 = 1.01;
const GAMMA = 0.055;
const EXPONENT = 0.63 / 1.2415;
const NANOMETRE = 1e-9;

/**
 * Viscosity and thermal conductivity of air, nitrogen, oxygen and argon after E. W. Lemmon and R. T Jacobsen, Int. J.
 * Thermophys. 25 (2004) 21-69, with the simplified critical enhancement of G. A. Olchowy and J. V. Sengers, Int. J.
 * Thermophys. 10 (1989) 417-426.
 */
export class LemmonJacobsenTransport implements TransportModel {
  private readonly reducingDensity: number;

  constructor(
    private readonly data: LemmonJacobsenData,
    private readonly molarMass: number,
    private readonly equation: HelmholtzEquation,
  ) {
    this.reducingDensity = data.reducingDensity * molarMass;
  }

  viscosity({ temperature, density }: State): number {
    return this.diluteViscosity(temperature) + this.residual(this.data.viscosity, temperature, density);
  }

  thermalConductivity(state: State): number {
    const { temperature, density } = state;
    const { perViscosity, terms } = this.data.diluteConductivity;
    const tau = this.data.reducingTemperature / temperature;
    let dilute = perViscosity * this.diluteViscosity(temperature) * 1e6;
    for (const [n, t] of terms) dilute += n * tau ** t;
    return dilute + this.residual(this.data.conductivity, temperature, density) + this.enhancement(state);
  }

  conductivityReason(): null {
    return null;
  }

  private diluteViscosity(temperature: number): number {
    const { collisionDiameter, collisionTemperature } = this.data;
    const x = Math.log(temperature / collisionTemperature);
    const logOmega = COLLISION_INTEGRAL.reduceRight((sum, b) => sum * x + b, 0);
    return (CHAPMAN_ENSKOG * Math.sqrt(this.molarMass * 1e3 * temperature)) / (collisionDiameter ** 2 * Math.exp(logOmega));
  }

  private residual(terms: readonly TransportTerm[], temperature: number, density: number): number {
    const tau = this.data.reducingTemperature / temperature;
    const delta = density / this.reducingDensity;
    let sum = 0;
    for (const [n, t, d, l] of terms) sum += n * tau ** t * delta ** d * (l > 0 ? Math.exp(-(delta ** l)) : 1);
    return sum;
  }

  /** What fluctuations of density near the critical point add to thermal conductivity, W/(m K). */
  private enhancement(state: State): number {
    const { temperature, density, isobaricHeatCapacity, isochoricHeatCapacity } = state;
    const { cutoff, amplitude, referenceTemperature } = this.data.enhancement;
    const excess =
      this.susceptibility(temperature, density) -
      (this.susceptibility(referenceTemperature, density) * referenceTemperature) / temperature;
    if (!(excess > 0)) return 0;
    const correlationLength = amplitude * NANOMETRE * (excess / GAMMA) ** EXPONENT;
    const y = correlationLength / (cutoff * NANOMETRE);
    const ratio = isochoricHeatCapacity / isobaricHeatCapacity;
    const omega = (2 / Math.PI) * ((1 - ratio) * Math.atan(y) + ratio * y);
    const relative = this.reducingDensity / density;
    const omega0 = (2 / Math.PI) * (1 - Math.exp(-1 / (1 / y + (y * relative) ** 2 / 3)));
    return (
      (density * isobaricHeatCapacity * R0 * BOLTZMANN * temperature * (omega - omega0)) /
      (6 * Math.PI * correlationLength * this.viscosity(state))
    );
  }

  /** Dimensionless (p_c rho / rho_c^2) (drho/dp)_T. */
  private susceptibility(temperature: number, density: number): number {
    const { equation } = this;
    equation.setTemperature(temperature);
    equation.setDensity(density);
    return (this.data.reducingPressure * density) / (this.reducingDensity ** 2 * equation.pressureByDensity);
  }
}
