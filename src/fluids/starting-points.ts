import type { FluidData } from "./fluid-data.js";
import type { HelmholtzEquation } from "./helmholtz.js";
import { chebyshevNodes, Interpolant } from "./polynomial.js";
import type { PhaseBoundary } from "./saturation.js";

/** The property given beside pressure. */
export type Caloric = 0 | 1;
export const ENTHALPY = 0;
export const ENTROPY = 1;

/** Points of the guesses; more cost construction time and save no step. */
const IDEAL_POINTS = 7;
const SATURATION_POINTS = 8;
/** kg/m3 at which a gas counts as ideal. */
const THIN = 1e-9;
/** Highest temperature of the saturation guesses over the critical one: nearer, the curves turn too sharply for a polynomial. */
const NEARLY_CRITICAL = 0.985;

/** One caloric property, enthalpy or entropy, turned roughly into temperature. */
interface Guesses {
  /** Ideal gas: K from J/kg; from J/(kg K) + R ln(p/Pa) the logarithm of K. */
  readonly ideal: Interpolant;
  /** Saturated liquid: K from J/kg or J/(kg K). */
  readonly liquid: Interpolant;
  /** Value in saturated liquid and vapour from ln(p/Pa). */
  readonly liquidLimit: Interpolant;
  readonly vapourLimit: Interpolant;
}

/**
 * Starting values for the flashes. Polynomials through a few states that the equation itself gives when a fluid is first
 * used; no result comes from them.
 */
export class StartingPoints {
  private readonly guesses: readonly [enthalpy: Guesses, entropy: Guesses];
  private readonly specificGasConstant: number;

  constructor(
    data: FluidData,
    equation: HelmholtzEquation,
    private readonly boundary: PhaseBoundary,
  ) {
    const { criticalTemperature } = boundary;
    const { minimumTemperature, maximumTemperature } = data.range;
    this.specificGasConstant = equation.specificGasConstant;
    const hot = chebyshevNodes(minimumTemperature, maximumTemperature, IDEAL_POINTS);
    const ideal = hot.map((temperature) => {
      equation.setTemperature(temperature);
      equation.setState(THIN);
      return { enthalpy: equation.enthalpy, entropy: equation.entropy + equation.specificGasConstant * Math.log(equation.pressure) };
    });
    const cold = chebyshevNodes(minimumTemperature, NEARLY_CRITICAL * criticalTemperature, SATURATION_POINTS).map((temperature) =>
      boundary.solve(boundary.bubblePressure(temperature)),
    );
    const logPressures = cold.map(({ pressure }) => Math.log(pressure));
    const temperatures = cold.map(({ bubbleTemperature }) => bubbleTemperature);
    const through = (liquid: number[], vapour: number[], idealGas: Interpolant): Guesses => ({
      ideal: idealGas,
      liquid: new Interpolant(liquid, temperatures),
      liquidLimit: new Interpolant(logPressures, liquid),
      vapourLimit: new Interpolant(logPressures, vapour),
    });
    this.guesses = [
      through(
        cold.map(({ liquidEnthalpy }) => liquidEnthalpy),
        cold.map(({ vapourEnthalpy }) => vapourEnthalpy),
        new Interpolant(ideal.map(({ enthalpy }) => enthalpy), hot),
      ),
      through(
        cold.map(({ liquidEntropy }) => liquidEntropy),
        cold.map(({ vapourEntropy }) => vapourEntropy),
        new Interpolant(ideal.map(({ entropy }) => entropy), hot.map(Math.log)),
      ),
    ];
  }

  /** Roughly the value in saturated liquid at a pressure given by ln(p/Pa), below 0.9 of the critical one. */
  liquidLimit(kind: Caloric, logPressure: number): number {
    return this.guesses[kind].liquidLimit.at(logPressure);
  }

  /** Roughly the value in saturated vapour. */
  vapourLimit(kind: Caloric, logPressure: number): number {
    return this.guesses[kind].vapourLimit.at(logPressure);
  }

  /** Temperature (K) of liquid with about this enthalpy or entropy. */
  liquidTemperature(kind: Caloric, value: number): number {
    return this.guesses[kind].liquid.at(value);
  }

  /** Temperature (K) of a gas with this enthalpy or entropy, its departure from the ideal gas by the second virial coefficient. */
  gasTemperature(kind: Caloric, pressure: number, value: number): number {
    const { ideal } = this.guesses[kind];
    const { criticalTemperature, criticalPressure } = this.boundary;
    const reducedPressure = pressure / criticalPressure;
    const sum = kind === ENTHALPY ? value : value + this.specificGasConstant * Math.log(pressure);
    let temperature = kind === ENTHALPY ? ideal.at(sum) : Math.exp(ideal.at(sum));
    // Pitzer and Curl's second virial coefficient of simple fluids, J. Am. Chem. Soc. 79 (1957) 2369.
    const inverse = Math.min(2, criticalTemperature / temperature);
    const inverse2 = inverse * inverse;
    if (kind === ENTHALPY) {
      const departure = reducedPressure * (0.1445 - 0.66 * inverse - 0.4155 * inverse2 - 0.0484 * inverse * inverse2);
      temperature = ideal.at(sum - departure * this.specificGasConstant * criticalTemperature);
    } else {
      const departure = -reducedPressure * (0.33 + 0.277 * inverse + 0.0363 * inverse2) * inverse2;
      temperature = Math.exp(ideal.at(sum - departure * this.specificGasConstant));
    }
    return temperature;
  }
}
