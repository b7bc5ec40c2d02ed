import { FluidError, NoCorrelationError, NotFiniteError, OutOfRangeError } from "./errors.js";
import type { FluidState, StateInput } from "./fluid-state.js";
import { Flash } from "./flash.js";
import type { FluidData } from "./fluid-data.js";
import type { Saturation } from "./saturation.js";
import { ENTHALPY, ENTROPY } from "./starting-points.js";
import { State } from "./state.js";
import { Transport } from "./transport.js";

export type { FluidState, StateInput } from "./fluid-state.js";

/** Share of a limit by which an input may lie beyond it: a state at the limit comes back from a search with round-off. */
const ROUND_OFF = 1e-9;

/**
 * A fluid and its states, SI units, mass-based; enthalpy and entropy are zero in the saturated liquid at 101.325 kPa.
 *
 * The flashes write into the state given and return it, so that a solver allocates nothing; what the state held before
 * may start the search and does not change the result. For single questions there is `at`.
 */
export class Fluid {
  readonly name: string;
  /** Where the equation of state is published. */
  readonly source: string;
  /** kg/mol */
  readonly molarMass: number;
  /** J/(kg K) */
  readonly specificGasConstant: number;
  /** K, where the two-phase region ends: the critical point, for air the maxcondentherm */
  readonly criticalTemperature: number;
  /** Pa, where the two-phase region ends */
  readonly criticalPressure: number;
  /** K */
  readonly minimumTemperature: number;
  /** K */
  readonly maximumTemperature: number;
  /** Pa */
  readonly maximumPressure: number;
  /** Pa; saturated liquid at a lower pressure would be colder than the lowest temperature */
  readonly lowestSaturationPressure: number;

  private readonly flash: Flash;
  private readonly transport: Transport;

  constructor(private readonly data: FluidData) {
    this.flash = new Flash(data);
    const { boundary, equation } = this.flash;
    this.transport = new Transport(data, equation);
    this.name = data.name;
    this.source = data.source;
    this.molarMass = data.molarMass;
    this.specificGasConstant = equation.specificGasConstant;
    this.criticalTemperature = boundary.criticalTemperature;
    this.criticalPressure = boundary.criticalPressure;
    this.minimumTemperature = data.range.minimumTemperature;
    this.maximumTemperature = data.range.maximumTemperature;
    this.maximumPressure = data.range.maximumPressure;
    this.lowestSaturationPressure = boundary.lowestPressure;
  }

  /**
   * The state at a temperature (K) and pressure (Pa).
   *
   * @throws OutOfRangeError, NotFiniteError; NoConvergenceError if a search fails
   */
  temperaturePressure(temperature: number, pressure: number, state: State): State {
    this.checkTemperature(temperature);
    this.checkPressure(pressure);
    return this.flash.temperaturePressure(temperature, pressure, state);
  }

  /**
   * The state at a pressure (Pa) and enthalpy (J/kg).
   *
   * @throws OutOfRangeError, NotFiniteError; NoConvergenceError if a search fails
   */
  pressureEnthalpy(pressure: number, enthalpy: number, state: State): State {
    this.checkPressure(pressure);
    if (!Number.isFinite(enthalpy)) throw new NotFiniteError(this.name, "enthalpy", enthalpy);
    return this.flash.pressureCaloric(ENTHALPY, pressure, enthalpy, state);
  }

  /**
   * The state at a pressure (Pa) and entropy (J/(kg K)).
   *
   * @throws OutOfRangeError, NotFiniteError; NoConvergenceError if a search fails
   */
  pressureEntropy(pressure: number, entropy: number, state: State): State {
    this.checkPressure(pressure);
    if (!Number.isFinite(entropy)) throw new NotFiniteError(this.name, "entropy", entropy);
    return this.flash.pressureCaloric(ENTROPY, pressure, entropy, state);
  }

  /**
   * The state at a pressure (Pa) below the critical one and a quality (mass of vapour over mass of fluid).
   *
   * @throws OutOfRangeError, NotFiniteError; NoConvergenceError if a search fails
   */
  pressureQuality(pressure: number, quality: number, state: State): State {
    this.checkSaturationPressure(pressure);
    if (!(quality >= 0 && quality <= 1)) throw this.outside("quality", quality, 0, 1, "", "quality runs");
    return this.flash.pressureQuality(pressure, quality, state);
  }

  /**
   * The state at a temperature (K) and density (kg/m3).
   *
   * @throws OutOfRangeError, NotFiniteError; NoConvergenceError if a search fails
   */
  temperatureDensity(temperature: number, density: number, state: State): State {
    this.checkTemperature(temperature);
    if (!(density > 0 && density < Infinity)) throw this.outside("density", density, 0, Infinity, "kg/m3");
    this.flash.temperatureDensity(temperature, density, state);
    if (!(state.pressure > 0 && state.pressure <= this.maximumPressure * (1 + ROUND_OFF))) {
      throw this.outside(`pressure at ${temperature} K and ${density} kg/m3,`, state.pressure, 0, this.maximumPressure, "Pa");
    }
    return state;
  }

  /**
   * Lowest temperature (K) at a pressure (Pa): `minimumTemperature`, or under high pressure the melting temperature less 1 K
   * of supercooling.
   *
   * @throws OutOfRangeError, NotFiniteError
   */
  lowestTemperature(pressure: number): number {
    this.checkPressure(pressure);
    return this.flash.melting.temperature(pressure);
  }

  /**
   * Both ends of the two-phase region at a pressure (Pa), remembered for the pressures used last.
   *
   * @throws OutOfRangeError from the critical pressure on, and below `lowestSaturationPressure`
   */
  saturation(pressure: number): Saturation {
    this.checkSaturationPressure(pressure);
    return this.flash.saturations.at(pressure);
  }

  /**
   * Pressure (Pa) at which liquid of a temperature (K) begins to boil.
   *
   * @throws OutOfRangeError outside the lowest and the critical temperature
   */
  bubblePressure(temperature: number): number {
    this.checkSaturationTemperature(temperature);
    return this.flash.boundary.bubblePressure(temperature);
  }

  /**
   * Pressure (Pa) at which gas of a temperature (K) begins to condense.
   *
   * @throws OutOfRangeError outside the lowest and the critical temperature
   */
  dewPressure(temperature: number): number {
    this.checkSaturationTemperature(temperature);
    return this.flash.boundary.dewPressure(temperature);
  }

  /**
   * Viscosity (Pa s) in a state that this fluid has written.
   *
   * @throws NoCorrelationError with the reason: two phases, or no published correlation at hand
   */
  viscosity(state: State): number {
    return this.transport.viscosity(state);
  }

  /**
   * Thermal conductivity (W/(m K)) in a state that this fluid has written.
   *
   * @throws NoCorrelationError with the reason: two phases, or no published correlation at hand
   */
  thermalConductivity(state: State): number {
    return this.transport.thermalConductivity(state);
  }

  /**
   * The state fixed by any of the pairs of properties, as a plain object.
   *
   * @throws OutOfRangeError, NotFiniteError; NoConvergenceError if a search fails
   *
   * @example
   * fluid("air").at({ temperature: 100, pressure: 5e5 }).enthalpy; // J/kg
   */
  at(input: StateInput): FluidState {
    const state = this.stateOf(input);
    return Object.freeze({
      temperature: state.temperature,
      pressure: state.pressure,
      density: state.density,
      enthalpy: state.enthalpy,
      entropy: state.entropy,
      internalEnergy: state.internalEnergy,
      isobaricHeatCapacity: orNull(state.isobaricHeatCapacity),
      isochoricHeatCapacity: orNull(state.isochoricHeatCapacity),
      speedOfSound: orNull(state.speedOfSound),
      vapourFraction: orNull(state.vapourFraction),
      phase: state.phase,
      viscosity: orNoCorrelation(() => this.viscosity(state)),
      thermalConductivity: orNoCorrelation(() => this.thermalConductivity(state)),
    });
  }

  private stateOf(input: StateInput): State {
    const state = new State();
    if ("temperature" in input) {
      if ("pressure" in input) return this.temperaturePressure(input.temperature, input.pressure, state);
      if ("density" in input) return this.temperatureDensity(input.temperature, input.density, state);
    } else if ("pressure" in input) {
      if ("enthalpy" in input) return this.pressureEnthalpy(input.pressure, input.enthalpy, state);
      if ("entropy" in input) return this.pressureEntropy(input.pressure, input.entropy, state);
      if ("quality" in input) return this.pressureQuality(input.pressure, input.quality, state);
    }
    throw new FluidError(
      "unknown-input",
      this.name,
      "a state takes temperature and pressure, pressure and enthalpy, pressure and entropy, pressure and quality, or temperature and density",
    );
  }

  private checkTemperature(temperature: number): void {
    const { minimumTemperature, maximumTemperature } = this;
    if (temperature >= minimumTemperature * (1 - ROUND_OFF) && temperature <= maximumTemperature * (1 + ROUND_OFF)) return;
    const { belowMinimum } = this.data.range;
    const reason = temperature < minimumTemperature ? belowMinimum : undefined;
    throw this.outside("temperature", temperature, minimumTemperature, maximumTemperature, "K", undefined, reason);
  }

  private checkPressure(pressure: number): void {
    if (pressure > 0 && pressure <= this.maximumPressure * (1 + ROUND_OFF)) return;
    throw this.outside("pressure", pressure, 0, this.maximumPressure, "Pa");
  }

  private checkSaturationPressure(pressure: number): void {
    const { lowestSaturationPressure, criticalPressure } = this;
    if (pressure >= lowestSaturationPressure && pressure < criticalPressure) return;
    if (pressure >= lowestSaturationPressure * (1 - ROUND_OFF) && pressure < criticalPressure) return;
    const reason = pressure < lowestSaturationPressure ? `where the liquid is colder than ${this.minimumTemperature} K` : "the end of the two-phase region";
    throw this.outside("pressure", pressure, lowestSaturationPressure, criticalPressure, "Pa", "liquid and vapour coexist", reason);
  }

  private checkSaturationTemperature(temperature: number): void {
    const { minimumTemperature, criticalTemperature } = this;
    if (temperature >= minimumTemperature * (1 - ROUND_OFF) && temperature <= criticalTemperature) return;
    const reason = temperature < minimumTemperature ? this.data.range.belowMinimum : "the end of the two-phase region";
    throw this.outside("temperature", temperature, minimumTemperature, criticalTemperature, "K", "liquid and vapour coexist", reason);
  }

  private outside(
    quantity: string,
    value: number,
    minimum: number,
    maximum: number,
    unit: string,
    subject?: string,
    reason?: string,
  ): NotFiniteError | OutOfRangeError {
    if (!Number.isFinite(value)) return new NotFiniteError(this.name, quantity, value);
    return new OutOfRangeError(this.name, { quantity, value, minimum, maximum, unit, subject, reason });
  }
}

function orNoCorrelation(find: () => number): number | null {
  try {
    return find();
  } catch (error) {
    if (error instanceof NoCorrelationError) return null;
    throw error;
  }
}

function orNull(value: number): number | null {
  return Number.isNaN(value) ? null : value;
}
