import { NoConvergenceError } from "./errors.js";
import type { HelmholtzEquation } from "./helmholtz.js";

/** Relative step of densities and temperature after which the next one is below round-off, Newton's steps squaring themselves. */
const LAST_STEP = 1e-9;
/** Round-off of a pressure near the critical point, over rho R T. */
const ROUND_OFF = 1e-15;
/** Ratio of liquid to vapour density below which the difference of their Helmholtz energies loses too many digits. */
const NEAR_DENSITIES = 1.3;
/** Nodes on either side of the middle and weights of Gauss's rule of 8 points (Abramowitz and Stegun, table 25.4). */
const NODES = [0.18343464249564978, 0.525532409916329, 0.7966664774136267, 0.9602898564975362];
const WEIGHTS = [0.36268378337836166, 0.3137066458778869, 0.22238103445337443, 0.10122853629037706];
/** Steps of a search; it takes 3 to 6, near the critical point some tens until round-off lets it settle. */
const MOST_STEPS = 200;
/** Share by which a guessed density that lies inside the unstable region is moved out of it at a time. */
const OUTWARD = 0.02;
/** Largest relative change of temperature in one step. */
const LONGEST_STEP = 0.05;

/** Liquid and vapour of a pure fluid in equilibrium: equal temperature, pressure and chemical potential. */
export class Coexistence {
  /** Pa, after `solve` */
  pressure = NaN;
  /** Pa/K, along the vapour-pressure curve (Clapeyron) */
  pressureByTemperature = NaN;
  /** kg/m3 */
  liquidDensity = NaN;
  /** kg/m3 */
  vapourDensity = NaN;

  constructor(
    private readonly name: string,
    private readonly equation: HelmholtzEquation,
    private readonly criticalDensity: number,
  ) {}

  /**
   * Newton's method in both densities and, where a pressure is given, in temperature as well. Equal chemical potential at
   * pressure p means equal areas: a_l - a_v = p (1 / rho_v - 1 / rho_l), a the Helmholtz energy.
   *
   * @param firstTemperature K, the temperature, or where to start with it when pressure is given
   * @param pressure Pa, or NaN
   * @param firstLiquid kg/m3, a guess, better too dense than too thin
   * @param firstVapour kg/m3, a guess, better too thin than too dense
   * @returns temperature, K
   * @throws NoConvergenceError
   */
  solve(firstTemperature: number, pressure: number, firstLiquid: number, firstVapour: number): number {
    const { equation, criticalDensity } = this;
    const { residual, specificGasConstant, reducingDensity } = equation;
    let temperature = firstTemperature;
    equation.setTemperature(temperature);
    let liquid = this.outside(firstLiquid, OUTWARD);
    // Near the critical point the two lie evenly about its density, and a guess farther out than that is still safe.
    let vapour = this.outside(Math.min(firstVapour, Math.max(2 * criticalDensity - liquid, 0.5 * criticalDensity)), -OUTWARD);
    for (let i = 0; i < MOST_STEPS; i++) {
      equation.setTemperature(temperature);
      const scale = specificGasConstant * temperature;
      residual.setDeltaFully(liquid / reducingDensity);
      const liquidEnergy = Math.log(liquid / criticalDensity) + residual.value;
      const liquidEntropy = residual.tau1 - liquidEnergy;
      const liquidPressure = liquid * scale * (1 + residual.delta1);
      const liquidSlope = scale * (1 + 2 * residual.delta1 + residual.delta2);
      const liquidWarming = liquid * specificGasConstant * (1 + residual.delta1 - residual.tau1delta1);
      residual.setDeltaFully(vapour / reducingDensity);
      const vapourEnergy = Math.log(vapour / criticalDensity) + residual.value;
      const vapourEntropy = residual.tau1 - vapourEnergy;
      const vapourPressure = vapour * scale * (1 + residual.delta1);
      const vapourSlope = scale * (1 + 2 * residual.delta1 + residual.delta2);
      const vapourWarming = vapour * specificGasConstant * (1 + residual.delta1 - residual.tau1delta1);
      if (!(liquidSlope > 0 && vapourSlope > 0)) break;
      const volume = 1 / vapour - 1 / liquid;
      const equalArea =
        liquid < NEAR_DENSITIES * vapour ? this.meanPressure(liquid, vapour) : (scale * (liquidEnergy - vapourEnergy)) / volume;
      const target = Number.isNaN(pressure) ? equalArea : pressure;
      let warmer = ((target - equalArea) * volume) / (specificGasConstant * (vapourEntropy - liquidEntropy));
      warmer = Math.max(-LONGEST_STEP * temperature, Math.min(LONGEST_STEP * temperature, warmer));
      const denser = (target - liquidPressure - liquidWarming * warmer) / liquidSlope;
      const thinner = (target - vapourPressure - vapourWarming * warmer) / vapourSlope;
      temperature += warmer;
      liquid += Math.max(-0.5 * liquid, Math.min(liquid, denser));
      vapour += Math.max(-0.5 * vapour, Math.min(vapour, thinner));
      const roundOff = ROUND_OFF * scale * liquid;
      const last =
        Math.abs(denser) <= LAST_STEP * liquid + roundOff / liquidSlope &&
        Math.abs(thinner) <= LAST_STEP * vapour + roundOff / vapourSlope;
      if (last && Math.abs(warmer) <= LAST_STEP * temperature && liquid > vapour) {
        this.pressure = target;
        this.pressureByTemperature = (specificGasConstant * (vapourEntropy - liquidEntropy)) / volume;
        this.liquidDensity = liquid;
        this.vapourDensity = vapour;
        return temperature;
      }
    }
    throw new NoConvergenceError(
      this.name,
      Number.isNaN(pressure) ? `saturation at ${firstTemperature} K` : `saturation at ${pressure} Pa`,
    );
  }

  /**
   * Mean of pressure (Pa) over volume between two densities (kg/m3), which is the same as the difference of their Helmholtz
   * energies over that of their volumes, but keeps its digits where both vanish. Exact to round-off over so short a way.
   */
  private meanPressure(liquid: number, vapour: number): number {
    const { equation } = this;
    const middle = 0.5 * (1 / vapour + 1 / liquid);
    const half = 0.5 * (1 / vapour - 1 / liquid);
    let sum = 0;
    for (let i = 0; i < NODES.length; i++) {
      equation.setDensity(1 / (middle - half * NODES[i]));
      sum += WEIGHTS[i] * equation.pressure;
      equation.setDensity(1 / (middle + half * NODES[i]));
      sum += WEIGHTS[i] * equation.pressure;
    }
    return 0.5 * sum;
  }

  /** A density (kg/m3) moved in one direction until it is mechanically stable at the equation's temperature. */
  private outside(density: number, change: number): number {
    const { equation } = this;
    let moved = density;
    for (let i = 0; i < MOST_STEPS; i++) {
      equation.setDensity(moved);
      if (equation.pressureByDensity > 0) break;
      moved *= 1 + change;
    }
    return moved;
  }
}
