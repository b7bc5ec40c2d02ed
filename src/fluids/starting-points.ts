import type { CubicGuess } from "./cubic-guess.js";
import type { DensitySearch } from "./density.js";
import type { FluidData } from "./fluid-data.js";
import type { HelmholtzEquation } from "./helmholtz.js";
import { chebyshevNodes, Interpolant } from "./polynomial.js";
import { GAS_SIDE, LIQUID_SIDE, TWO_PHASE_SIDE, type PhaseBoundary, type Side } from "./saturation.js";

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
/** The same above the critical pressure. */
const LIQUID_LIMIT = 0.93;
/** Share of the heat of vaporisation by which a guess of a saturated value may err. */
const GUESS_MARGIN = 0.03;
/** Share of the critical pressure up to which those guesses hold. */
const GUESS_LIMIT = 0.85;
/** Expansion coefficient times temperature of a simple liquid, roughly: share of v dp that is T ds. */
const LIQUID_EXPANSION = 0.5;
/** ln(p / pc) = 5.4 (1 - Tc / T) is roughly the vapour pressure of a simple fluid. */
const VAPOUR_PRESSURE_SLOPE = 5.4;
/** Departure of dense fluid from the ideal gas, in units of R Tc or R, beyond any in range. */
const LARGEST_DEPARTURE = 6;
/** Lowest temperature over the critical one at which the cubic equation is asked. */
const DENSE_LIMIT = 0.7;
/** Steps that bring the dense start within the cubic equation's own error. */
const DENSE_STEPS = 2;

/** One caloric property, enthalpy or entropy, turned roughly into temperature. */
interface Guesses {
  /** Ideal gas: K from J/kg; the logarithm of K from J/(kg K) + R ln(p/Pa). */
  readonly ideal: Interpolant;
  /** Its inverse. */
  readonly ofIdeal: Interpolant;
  /** Saturated liquid: K from J/kg or J/(kg K). */
  readonly liquid: Interpolant;
  /** Value in saturated liquid at `LIQUID_LIMIT` of the critical temperature. */
  readonly liquidEnd: number;
  /** Value in saturated liquid and vapour from ln(p/Pa). */
  readonly liquidLimit: Interpolant;
  readonly vapourLimit: Interpolant;
}

/**
 * Starting values for the searches from pressure and enthalpy or entropy. Polynomials through a few states that the
 * equation itself gives when a fluid is first used, and a cubic equation of state; no result comes from them.
 */
export class StartingPoints {
  /** K, after the last `place` */
  temperature = NaN;
  /** kg/m3 */
  density = NaN;

  private readonly guesses: readonly [enthalpy: Guesses, entropy: Guesses];
  private readonly cubic: CubicGuess;
  private readonly lowest: number;
  private readonly specificGasConstant: number;

  constructor(
    { range }: FluidData,
    private readonly equation: HelmholtzEquation,
    private readonly boundary: PhaseBoundary,
    private readonly search: DensitySearch,
  ) {
    const { criticalTemperature } = boundary;
    const { minimumTemperature, maximumTemperature } = range;
    this.lowest = minimumTemperature;
    this.specificGasConstant = equation.specificGasConstant;
    this.cubic = search.cubic;
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
    const through = (liquid: number[], vapour: number[], gas: number[], hotness: number[]): Guesses => ({
      ideal: new Interpolant(gas, hotness),
      ofIdeal: new Interpolant(hotness, gas),
      liquid: new Interpolant(liquid, temperatures),
      liquidEnd: new Interpolant(temperatures, liquid).at(LIQUID_LIMIT * criticalTemperature),
      liquidLimit: new Interpolant(logPressures, liquid),
      vapourLimit: new Interpolant(logPressures, vapour),
    });
    this.guesses = [
      through(
        cold.map(({ liquidEnthalpy }) => liquidEnthalpy),
        cold.map(({ vapourEnthalpy }) => vapourEnthalpy),
        ideal.map(({ enthalpy }) => enthalpy),
        hot,
      ),
      through(
        cold.map(({ liquidEntropy }) => liquidEntropy),
        cold.map(({ vapourEntropy }) => vapourEntropy),
        ideal.map(({ entropy }) => entropy),
        hot.map(Math.log),
      ),
    ];
  }

  /** The phase below the critical pressure (Pa), or two-phase where the guess is too rough to tell. */
  side(kind: Caloric, pressure: number, value: number): Side {
    if (pressure > GUESS_LIMIT * this.boundary.criticalPressure) return TWO_PHASE_SIDE;
    const logPressure = Math.log(pressure);
    const { vapourLimit, liquidLimit } = this.guesses[kind];
    const vapour = vapourLimit.at(logPressure);
    const liquid = liquidLimit.at(logPressure);
    const margin = GUESS_MARGIN * (vapour - liquid);
    if (value > vapour + margin) return GAS_SIDE;
    return value < liquid - margin ? LIQUID_SIDE : TWO_PHASE_SIDE;
  }

  /** Leaves temperature and density from which to search for the state of a phase, the liquid side above the critical pressure. */
  place(kind: Caloric, pressure: number, value: number, side: Side): void {
    const { boundary, equation, search, lowest } = this;
    const { criticalTemperature } = boundary;
    const dense = pressure >= boundary.criticalPressure;
    let temperature = side === LIQUID_SIDE ? this.liquidTemperature(kind, pressure, value) : this.gasTemperature(kind, pressure, value);
    if (dense && !(temperature > lowest && temperature < LIQUID_LIMIT * criticalTemperature)) {
      temperature = this.denseTemperature(kind, pressure, value);
    }
    equation.setTemperature(temperature);
    this.temperature = temperature;
    if (side === LIQUID_SIDE && temperature < NEARLY_CRITICAL * criticalTemperature) {
      this.density = search.compressed(pressure, boundary.liquidDensityGuess(temperature));
    } else if (dense || temperature >= criticalTemperature) {
      this.density = search.aboveGuess(temperature, pressure);
    } else {
      this.density = search.virialGuess(temperature, pressure);
    }
  }

  /** K, of liquid; NaN above the critical pressure where the value is too high for one. */
  private liquidTemperature(kind: Caloric, pressure: number, value: number): number {
    const { boundary } = this;
    const { criticalTemperature, criticalPressure } = boundary;
    const { liquid, liquidEnd } = this.guesses[kind];
    if (pressure >= criticalPressure && value > liquidEnd) return NaN;
    const first = liquid.at(value);
    // The same temperature at saturation: h less (1 - expansion) v dp, s more expansion v dp / T
    const vapourPressure = criticalPressure * Math.exp(VAPOUR_PRESSURE_SLOPE * (1 - criticalTemperature / first));
    const work = (pressure - vapourPressure) / boundary.liquidDensityGuess(first);
    return liquid.at(kind === ENTHALPY ? value - (1 - LIQUID_EXPANSION) * work : value + (LIQUID_EXPANSION * work) / first);
  }

  /** K, of a gas, its departure from the ideal gas by the second virial coefficient. */
  private gasTemperature(kind: Caloric, pressure: number, value: number): number {
    const { ideal } = this.guesses[kind];
    const { criticalTemperature, criticalPressure } = this.boundary;
    const reducedPressure = Math.min(1, pressure / criticalPressure);
    const sum = kind === ENTHALPY ? value : value + this.specificGasConstant * Math.log(pressure);
    const first = kind === ENTHALPY ? ideal.at(sum) : Math.exp(ideal.at(sum));
    // Pitzer and Curl's second virial coefficient of simple fluids, J. Am. Chem. Soc. 79 (1957) 2369.
    const inverse = Math.min(2, criticalTemperature / first);
    const square = inverse * inverse;
    if (kind === ENTHALPY) {
      const departure = reducedPressure * (0.1445 - 0.66 * inverse - 0.4155 * square - 0.0484 * inverse * square);
      return ideal.at(sum - departure * this.specificGasConstant * criticalTemperature);
    }
    const departure = -reducedPressure * (0.33 + 0.277 * inverse + 0.0363 * square) * square;
    return Math.exp(ideal.at(sum - departure * this.specificGasConstant));
  }

  /** K, of dense fluid, by the cubic equation: regula falsi (Illinois) around the ideal gas's temperature. */
  private denseTemperature(kind: Caloric, pressure: number, value: number): number {
    const { criticalTemperature } = this.boundary;
    const { ideal } = this.guesses[kind];
    const { specificGasConstant } = this;
    let low = Math.max(this.lowest, DENSE_LIMIT * criticalTemperature);
    let atLow = this.denseMiss(kind, pressure, value, low);
    if (!(atLow > 0)) return low;
    const most = LARGEST_DEPARTURE * specificGasConstant;
    let high =
      kind === ENTHALPY
        ? ideal.at(value + most * criticalTemperature)
        : Math.exp(ideal.at(value + specificGasConstant * Math.log(pressure) + most));
    high = Math.max(high, 2 * low);
    let atHigh = this.denseMiss(kind, pressure, value, high);
    let temperature = Math.max(low, Math.min(high, this.gasTemperature(kind, pressure, value)));
    let side = 0;
    for (let i = 0; i < DENSE_STEPS; i++) {
      const miss = this.denseMiss(kind, pressure, value, temperature);
      if (miss > 0) {
        low = temperature;
        atLow = miss;
        if (side > 0) atHigh *= 0.5;
        side = 1;
      } else {
        high = temperature;
        atHigh = miss;
        if (side < 0) atLow *= 0.5;
        side = -1;
      }
      temperature = low + ((high - low) * atLow) / (atLow - atHigh);
    }
    return temperature;
  }

  private denseMiss(kind: Caloric, pressure: number, value: number, temperature: number): number {
    const { cubic } = this;
    const { ofIdeal } = this.guesses[kind];
    cubic.departures(temperature, pressure);
    if (kind === ENTHALPY) return value - ofIdeal.at(temperature) - cubic.enthalpyDeparture;
    return value + this.specificGasConstant * Math.log(pressure) - ofIdeal.at(Math.log(temperature)) - cubic.entropyDeparture;
  }
}
