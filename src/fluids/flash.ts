import { BubbleDewBoundary } from "./bubble-dew.js";
import { CaloricSearch } from "./caloric.js";
import { DensitySearch, SATURATION_MARGIN, SURELY_GAS, SURELY_LIQUID } from "./density.js";
import { OutOfRangeError } from "./errors.js";
import type { FluidData } from "./fluid-data.js";
import { HelmholtzEquation } from "./helmholtz.js";
import { MeltingLimit } from "./melting.js";
import { SaturationCache } from "./saturation-cache.js";
import { GAS_SIDE, LIQUID_SIDE, TWO_PHASE_SIDE, type PhaseBoundary, type Saturation, type Side } from "./saturation.js";
import { ENTHALPY, ENTROPY, StartingPoints, type Caloric } from "./starting-points.js";
import type { Phase, State } from "./state.js";
import { VapourPressureBoundary } from "./vapour-pressure.js";
import { writeSinglePhase, writeTwoPhase } from "./write.js";

/** Pa, at which saturated liquid has zero enthalpy and entropy. */
const ZERO_PRESSURE = 101325;
/** Share of a limiting temperature that a search may end beyond it, by round-off. */
const ROUND_OFF = 1e-9;
/** The same of a melting pressure, which is steep in temperature. */
const MELTING_ROUND_OFF = 1e-8;

/**
 * The flashes of one fluid: which phase or phases, and the state. Inputs have been checked before.
 *
 * The fast searches start from a guess of the phase and are believed only when they end in the stable phase; otherwise
 * saturation is solved, and a bracketed search follows, so that the start decides the time taken and nothing else.
 */
export class Flash {
  readonly equation: HelmholtzEquation;
  readonly boundary: PhaseBoundary;
  readonly saturations: SaturationCache;
  readonly melting: MeltingLimit;

  private readonly search: DensitySearch;
  private readonly caloric: CaloricSearch;
  private startingPoints: StartingPoints | undefined;

  constructor(private readonly data: FluidData) {
    this.equation = new HelmholtzEquation(data);
    this.search = new DensitySearch(data, this.equation);
    this.boundary = phaseBoundary(data, this.equation, this.search);
    this.saturations = new SaturationCache(this.boundary);
    this.caloric = new CaloricSearch(data.name, this.equation, this.boundary, this.search);
    const { minimumTemperature, maximumPressure, melting } = data.range;
    this.melting = new MeltingLimit(melting, minimumTemperature, maximumPressure);
    const zero = this.boundary.solve(ZERO_PRESSURE);
    this.equation.moveZero(zero.liquidEnthalpy, zero.liquidEntropy);
  }

  temperaturePressure(temperature: number, pressure: number, state: State): State {
    const { boundary, equation } = this;
    this.checkMelting(temperature, pressure);
    const side = temperature < boundary.criticalTemperature ? boundary.side(temperature, pressure) : GAS_SIDE;
    if (side === TWO_PHASE_SIDE) {
      if (pressure < boundary.lowestPressure) throw this.freezing(temperature, pressure);
      const saturation = this.saturations.at(pressure);
      const { bubbleTemperature, dewTemperature } = saturation;
      return writeTwoPhase(saturation, (temperature - bubbleTemperature) / (dewTemperature - bubbleTemperature), state);
    }
    const density = this.caloric.densityAt(temperature, pressure, side);
    equation.setState(density);
    const step = (pressure - equation.pressure) / equation.pressureByDensity;
    return writeSinglePhase(
      equation,
      temperature,
      density + step,
      pressure,
      equation.enthalpy + equation.enthalpyByDensity() * step,
      equation.entropy + equation.entropyByDensity() * step,
      this.phase(temperature, pressure, side),
      boundary.criticalPressure,
      state,
    );
  }

  temperatureDensity(temperature: number, density: number, state: State): State {
    const { boundary, equation } = this;
    let side: Side = GAS_SIDE;
    if (temperature < boundary.criticalTemperature) {
      const pressure = boundary.pressureInside(temperature, density);
      if (pressure > 0) {
        const saturation = this.saturations.at(pressure);
        const volume = 1 / saturation.vapourDensity - 1 / saturation.liquidDensity;
        writeTwoPhase(saturation, (1 / density - 1 / saturation.liquidDensity) / volume, state);
        state.temperature = temperature;
        state.density = density;
        return state;
      }
      if (density > boundary.criticalDensity) side = LIQUID_SIDE;
    }
    equation.setTemperature(temperature);
    equation.setState(density);
    const { pressure, enthalpy, entropy } = equation;
    this.checkMelting(temperature, pressure);
    const phase = this.phase(temperature, pressure, side);
    return writeSinglePhase(equation, temperature, density, pressure, enthalpy, entropy, phase, boundary.criticalPressure, state);
  }

  /** Quality between 0 and 1, pressure between the boundary's lowest and critical one. */
  pressureQuality(pressure: number, quality: number, state: State): State {
    return writeTwoPhase(this.saturations.at(pressure), quality, state);
  }

  pressureCaloric(kind: Caloric, pressure: number, value: number, state: State): State {
    const { boundary, saturations } = this;
    let saturation: Saturation | undefined;
    let side: Side = LIQUID_SIDE;
    let low = NaN;
    let high = this.data.range.maximumTemperature;
    if (pressure < boundary.lowestPressure) {
      side = GAS_SIDE;
    } else if (pressure < boundary.criticalPressure) {
      saturation = saturations.known(pressure);
      side = saturation === undefined ? this.points().side(kind, pressure, value) : sideOf(kind, saturation, value);
    }
    if (side !== TWO_PHASE_SIDE && this.findFast(kind, pressure, value, side, saturation, state)) {
      return this.write(pressure, side, state);
    }
    if (pressure < boundary.lowestPressure) {
      low = boundary.lowestGasTemperature(pressure);
    } else if (pressure < boundary.criticalPressure) {
      saturation ??= saturations.at(pressure);
      side = sideOf(kind, saturation, value);
      if (side === TWO_PHASE_SIDE) return writeTwoPhase(saturation, qualityOf(kind, saturation, value), state);
      if (side === GAS_SIDE) low = saturation.dewTemperature;
      else high = saturation.bubbleTemperature;
      if (this.findFast(kind, pressure, value, side, saturation, state)) return this.write(pressure, side, state);
    }
    if (Number.isNaN(low)) low = this.melting.temperature(pressure);
    if (this.caloric.bracketed(kind, pressure, value, side, low, high) !== 0) {
      throw this.outOfRange(kind, pressure, value, side, low);
    }
    return this.write(pressure, side, state);
  }

  /** The fast search from the best start at hand; false unless it ends in the stable phase on `side`, in range. */
  private findFast(kind: Caloric, pressure: number, value: number, side: Side, saturation: Saturation | undefined, state: State): boolean {
    const { caloric } = this;
    if (
      caloric.predict(kind, pressure, value, state) &&
      caloric.refine(kind, pressure, value, caloric.temperature, caloric.density) &&
      this.isStable(pressure, side, saturation)
    ) {
      return true;
    }
    const points = this.points();
    points.place(kind, pressure, value, side);
    return caloric.refine(kind, pressure, value, points.temperature, points.density) && this.isStable(pressure, side, saturation);
  }

  /** Whether the state found lies in range and on its side of the phase boundary, not in a continuation beyond it. */
  private isStable(pressure: number, side: Side, saturation: Saturation | undefined): boolean {
    const { boundary } = this;
    const { temperature, density } = this.caloric;
    const { minimumTemperature, maximumTemperature } = this.data.range;
    if (!(temperature >= minimumTemperature * (1 - ROUND_OFF) && temperature <= maximumTemperature * (1 + ROUND_OFF))) return false;
    if (pressure > this.melting.free && pressure > this.melting.pressure(temperature) * (1 + MELTING_ROUND_OFF)) return false;
    if (temperature >= boundary.criticalTemperature) return side === GAS_SIDE || pressure >= boundary.criticalPressure;
    const share = density / boundary.criticalDensity;
    if (side === GAS_SIDE) {
      if (share > SURELY_GAS && density > (1 + SATURATION_MARGIN) * boundary.vapourDensityGuess(temperature)) return false;
      if (saturation !== undefined) return temperature >= saturation.dewTemperature * (1 - ROUND_OFF);
    } else {
      if (share < SURELY_LIQUID && density < (1 - SATURATION_MARGIN) * boundary.liquidDensityGuess(temperature)) return false;
      if (saturation !== undefined) return temperature <= saturation.bubbleTemperature * (1 + ROUND_OFF);
    }
    return boundary.side(temperature, pressure) === side;
  }

  private write(pressure: number, side: Side, state: State): State {
    const { caloric, equation, boundary } = this;
    const { temperature, density, enthalpy, entropy } = caloric;
    const phase = this.phase(temperature, pressure, side);
    return writeSinglePhase(equation, temperature, density, pressure, enthalpy, entropy, phase, boundary.criticalPressure, state);
  }

  private phase(temperature: number, pressure: number, side: Side): Phase {
    const { criticalPressure, criticalTemperature } = this.boundary;
    if (temperature >= criticalTemperature) return pressure > criticalPressure ? "supercritical" : "gas";
    return pressure > criticalPressure || side === LIQUID_SIDE ? "liquid" : "gas";
  }

  private points(): StartingPoints {
    return (this.startingPoints ??= new StartingPoints(this.data, this.equation, this.boundary, this.search));
  }

  private checkMelting(temperature: number, pressure: number): void {
    if (pressure <= this.melting.free) return;
    const maximum = this.melting.pressure(temperature);
    if (pressure <= maximum * (1 + MELTING_ROUND_OFF)) return;
    throw new OutOfRangeError(this.data.name, {
      quantity: `pressure at ${temperature} K`,
      value: pressure,
      minimum: 0,
      maximum,
      unit: "Pa",
      reason: "where it freezes",
      subject: "it is fluid",
    });
  }

  /** Between bubble and dew, with a bubble point colder than the range. */
  private freezing(temperature: number, pressure: number): OutOfRangeError {
    return new OutOfRangeError(this.data.name, {
      quantity: `pressure at ${temperature} K`,
      value: pressure,
      minimum: this.boundary.lowestPressure,
      maximum: this.data.range.maximumPressure,
      unit: "Pa",
      reason: "where the liquid part freezes",
    });
  }

  private outOfRange(kind: Caloric, pressure: number, value: number, side: Side, low: number): OutOfRangeError {
    const { caloric, equation, data } = this;
    const limit = (temperature: number): number => {
      const density = caloric.densityAt(temperature, pressure, side);
      equation.setTemperature(temperature);
      equation.setState(density);
      return kind === ENTROPY ? equation.entropy : equation.enthalpy;
    };
    const minimum = limit(low);
    return new OutOfRangeError(data.name, {
      quantity: `${kind === ENTHALPY ? "enthalpy" : "entropy"} at ${pressure} Pa`,
      value,
      minimum,
      maximum: limit(data.range.maximumTemperature),
      unit: kind === ENTHALPY ? "J/kg" : "J/(kg K)",
      reason: value < minimum ? data.range.belowMinimum : undefined,
    });
  }
}

function phaseBoundary(data: FluidData, equation: HelmholtzEquation, search: DensitySearch): PhaseBoundary {
  if (data.phases.kind === "bubble-and-dew") return new BubbleDewBoundary(data, data.phases, equation, search);
  return new VapourPressureBoundary(data, data.phases, equation);
}

function sideOf(kind: Caloric, saturation: Saturation, value: number): Side {
  const liquid = kind === ENTHALPY ? saturation.liquidEnthalpy : saturation.liquidEntropy;
  const vapour = kind === ENTHALPY ? saturation.vapourEnthalpy : saturation.vapourEntropy;
  if (value >= vapour) return GAS_SIDE;
  return value <= liquid ? LIQUID_SIDE : TWO_PHASE_SIDE;
}

function qualityOf(kind: Caloric, saturation: Saturation, value: number): number {
  const liquid = kind === ENTHALPY ? saturation.liquidEnthalpy : saturation.liquidEntropy;
  const vapour = kind === ENTHALPY ? saturation.vapourEnthalpy : saturation.vapourEntropy;
  return (value - liquid) / (vapour - liquid);
}
