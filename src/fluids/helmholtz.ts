import type { FluidData } from "./fluid-data.js";
import { IdealHelmholtz } from "./ideal.js";
import { ResidualHelmholtz } from "./residual.js";

/**
 * Properties of one phase from temperature and density, by the derivatives of the Helmholtz energy
 * (relations as in Span, Multiparameter Equations of State, Springer 2000). Mass-based; enthalpy and entropy on the
 * equation's own zero until it is moved. Results are left in the fields; nothing is allocated after construction.
 */
export class HelmholtzEquation {
  /** J/(kg K) */
  readonly specificGasConstant: number;
  /** kg/m3 */
  readonly reducingDensity: number;
  readonly reducingTemperature: number;
  readonly residual: ResidualHelmholtz;

  /** K, of the last `setTemperature` */
  temperature = NaN;
  /** kg/m3, of the last `setDensity` or `setState` */
  density = NaN;
  /** Pa */
  pressure = NaN;
  /** (dp/drho)_T, J/kg */
  pressureByDensity = NaN;
  // The fields from here on are set by `setState` alone.
  /** (dp/dT)_rho, Pa/K */
  pressureByTemperature = NaN;
  /** J/kg */
  enthalpy = NaN;
  /** J/(kg K) */
  entropy = NaN;
  /** J/(kg K) */
  isochoricHeatCapacity = NaN;

  private readonly ideal: IdealHelmholtz;
  private enthalpyZero = 0;
  private entropyZero = 0;
  private idealTemperature = NaN;

  constructor(data: FluidData) {
    this.specificGasConstant = data.gasConstant / data.molarMass;
    this.reducingDensity = data.reducingDensity * data.molarMass;
    this.reducingTemperature = data.reducingTemperature;
    this.residual = new ResidualHelmholtz(data.residual);
    this.ideal = new IdealHelmholtz(data.ideal);
  }

  /** Counts enthalpy (J/kg) and entropy (J/(kg K)) from these values of the present zero. */
  moveZero(enthalpy: number, entropy: number): void {
    this.enthalpyZero += enthalpy;
    this.entropyZero += entropy;
  }

  /** Sets the temperature (K) of the evaluations that follow; costs nothing when it is the one already set. */
  setTemperature(temperature: number): void {
    if (temperature === this.temperature) return;
    this.temperature = temperature;
    this.residual.setTau(this.reducingTemperature / temperature);
  }

  /** Leaves pressure and its slope at a density (kg/m3): what a search for density needs. */
  setDensity(density: number): void {
    const { residual } = this;
    residual.setDelta(density / this.reducingDensity);
    const scale = this.specificGasConstant * this.temperature;
    this.density = density;
    this.pressure = density * scale * (1 + residual.delta1);
    this.pressureByDensity = scale * (1 + 2 * residual.delta1 + residual.delta2);
  }

  /** Leaves all properties at a density (kg/m3). */
  setState(density: number): void {
    const { residual, ideal, temperature, specificGasConstant } = this;
    const tau = this.reducingTemperature / temperature;
    const delta = density / this.reducingDensity;
    residual.setDeltaFully(delta);
    if (this.idealTemperature !== temperature) {
      this.idealTemperature = temperature;
      ideal.setTau(tau);
    }
    const scale = specificGasConstant * temperature;
    const { delta1 } = residual;
    const tau1 = ideal.tau1 + residual.tau1;
    this.density = density;
    this.pressure = density * scale * (1 + delta1);
    this.pressureByDensity = scale * (1 + 2 * delta1 + residual.delta2);
    this.pressureByTemperature = density * specificGasConstant * (1 + delta1 - residual.tau1delta1);
    this.enthalpy = scale * (1 + tau1 + delta1) - this.enthalpyZero;
    this.entropy = specificGasConstant * (tau1 - ideal.value - Math.log(delta) - residual.value) - this.entropyZero;
    this.isochoricHeatCapacity = -specificGasConstant * (ideal.tau2 + residual.tau2);
  }

  /** J/(kg K), at the last `setState`. */
  isobaricHeatCapacity(): number {
    const slope = this.pressureByTemperature / this.density;
    return this.isochoricHeatCapacity + (this.temperature * slope * slope) / this.pressureByDensity;
  }

  /** m/s, at the last `setState`. */
  speedOfSound(): number {
    const slope = this.pressureByTemperature / this.density;
    return Math.sqrt(this.pressureByDensity + (this.temperature * slope * slope) / this.isochoricHeatCapacity);
  }

  /** (dh/drho)_T, J m3/kg2, at the last `setState`. */
  enthalpyByDensity(): number {
    return (this.pressureByDensity - (this.temperature * this.pressureByTemperature) / this.density) / this.density;
  }

  /** (ds/drho)_T, J m3/(kg2 K), at the last `setState`. */
  entropyByDensity(): number {
    return -this.pressureByTemperature / (this.density * this.density);
  }
}
