import { bracketedRoot } from "./root.js";
import { airPairs } from "./data/air-mixture.js";
import { argon } from "./data/argon.js";
import { nitrogen } from "./data/nitrogen.js";
import { oxygen } from "./data/oxygen.js";
import { Equilibrium, type GuessData } from "./equilibrium.js";
import { OutOfRangeError } from "./errors.js";
import { MixturePhase } from "./mixture-phase.js";

/** Mole fractions of nitrogen, argon and oxygen. */
export interface Composition {
  readonly nitrogen: number;
  readonly argon: number;
  readonly oxygen: number;
}

/** What a flash is asked at. */
export type FlashInput =
  | { /** Pa */ readonly pressure: number; /** molar, 0 at the bubble point, 1 at the dew point */ readonly vapourFraction: number }
  | { /** K */ readonly temperature: number; /** Pa */ readonly pressure: number }
  | { /** Pa */ readonly pressure: number; /** J/kg, zero in the mixture's liquid at its bubble point at 101.325 kPa */ readonly enthalpy: number };

/** A mixture's state: one phase or two in equilibrium. */
export interface Flash {
  /** K */
  readonly temperature: number;
  /** Pa */
  readonly pressure: number;
  /** mol/mol */
  readonly vapourFraction: number;
  /** J/kg */
  readonly enthalpy: number;
  /** Mole fractions of the liquid; null where there is none. */
  readonly liquid: Composition | null;
  readonly vapour: Composition | null;
}

const COMPONENTS = [nitrogen, argon, oxygen];
/** Pitzer's acentric factors, for the first guess of a flash only (from memory). */
const ACENTRIC_FACTORS = [0.0372, -0.0022, 0.0222];
/** Sum of mole fractions that counts as one. */
const SUM_TOLERANCE = 1e-6;
/** K, where air begins to freeze (Lemmon et al. 2000): below it the equations describe no liquid that there is. */
const LOWEST_TEMPERATURE = 59.75;
const HIGHEST_TEMPERATURE = 1000;
const LOWEST_PRESSURE = 100;
/** Pressure of the reference state, Pa. */
const REFERENCE_PRESSURE = 101325;

/** Nitrogen, argon and oxygen in any proportion, liquid, vapour and both. */
export class Mixture {
  /** kg/mol */
  readonly molarMass: number;
  private readonly phases: Equilibrium;
  private readonly phase: MixturePhase;
  private readonly z: Float64Array;
  private zero = NaN;

  /** @throws RangeError when the fractions are negative or do not sum to one */
  constructor(composition: Composition) {
    this.z = Float64Array.of(composition.nitrogen, composition.argon, composition.oxygen);
    const sum = this.z.reduce((total, fraction) => total + fraction, 0);
    if (!(Math.abs(sum - 1) <= SUM_TOLERANCE) || this.z.some((fraction) => !(fraction >= 0))) {
      throw new RangeError(`mole fractions should be at least 0 and sum to 1; they sum to ${sum}`);
    }
    for (let i = 0; i < this.z.length; i++) this.z[i] /= sum;
    this.molarMass = this.z.reduce((total, fraction, i) => total + fraction * COMPONENTS[i].molarMass, 0);
    this.phases = equilibrium(this.z);
    this.phase = new MixturePhase(COMPONENTS, airPairs);
    this.phase.x.set(this.z);
  }

  /** The temperature at which the first vapour leaves the liquid at a pressure (Pa), and its composition. */
  bubblePoint(pressure: number): Flash {
    return this.flash({ pressure, vapourFraction: 0 });
  }

  /** The temperature at which the first liquid forms at a pressure (Pa), and its composition. */
  dewPoint(pressure: number): Flash {
    return this.flash({ pressure, vapourFraction: 1 });
  }

  /**
   * Phase equilibrium at pressure and vapour fraction, temperature and pressure, or pressure and enthalpy.
   *
   * @throws OutOfRangeError outside the range of temperatures and pressures
   * @throws NoConvergenceError in the critical region
   */
  flash(input: FlashInput): Flash {
    const { pressure } = input;
    check("pressure", pressure, LOWEST_PRESSURE, Infinity, "Pa");
    if ("vapourFraction" in input) {
      check("vapour fraction", input.vapourFraction, 0, 1, "");
      return this.at(pressure, input.vapourFraction);
    }
    const bubble = this.at(pressure, 0);
    const dew = this.at(pressure, 1);
    if ("temperature" in input) {
      check("temperature", input.temperature, LOWEST_TEMPERATURE, HIGHEST_TEMPERATURE, "K");
      return this.between(pressure, input.temperature, bubble, dew, (flash) => flash.temperature, (side) =>
        this.single(pressure, input.temperature, side),
      );
    }
    return this.between(pressure, input.enthalpy, bubble, dew, (flash) => flash.enthalpy, (side) => {
      const [cold, warm] = side === "liquid" ? [LOWEST_TEMPERATURE, bubble.temperature] : [dew.temperature, HIGHEST_TEMPERATURE];
      const miss = (temperature: number): number => this.single(pressure, temperature, side).enthalpy - input.enthalpy;
      const atCold = miss(cold);
      const atWarm = miss(warm);
      if (atCold > 0 || atWarm < 0) check("enthalpy", input.enthalpy, input.enthalpy + atCold, input.enthalpy + atWarm, "J/kg");
      return this.single(pressure, bracketedRoot(miss, cold, warm, {}, atCold, atWarm), side);
    });
  }

  /** The state of one phase or of two, by a quantity that rises from the bubble point to the dew point. */
  private between(
    pressure: number,
    value: number,
    bubble: Flash,
    dew: Flash,
    quantity: (flash: Flash) => number,
    outside: (side: "liquid" | "vapour") => Flash,
  ): Flash {
    const atBubble = quantity(bubble) - value;
    const atDew = quantity(dew) - value;
    if (atBubble > 0) return outside("liquid");
    if (atDew < 0) return outside("vapour");
    const miss = (fraction: number): number => quantity(this.at(pressure, fraction)) - value;
    return this.at(pressure, bracketedRoot(miss, 0, 1, {}, atBubble, atDew));
  }

  private at(pressure: number, vapourFraction: number): Flash {
    const { phases, molarMass } = this;
    phases.solve(pressure, vapourFraction);
    const { temperature, liquid, vapour } = phases;
    check("temperature", temperature, LOWEST_TEMPERATURE, HIGHEST_TEMPERATURE, "K");
    const enthalpy =
      ((1 - vapourFraction) * liquid.enthalpy() + vapourFraction * vapour.enthalpy()) / molarMass - this.referenceEnthalpy();
    return { temperature, pressure, vapourFraction, enthalpy, liquid: named(liquid.x), vapour: named(vapour.x) };
  }

  private single(pressure: number, temperature: number, side: "liquid" | "vapour"): Flash {
    const { phase, molarMass, z } = this;
    phase.set(temperature);
    if (!phase.findDensity(pressure, side)) check("temperature", temperature, NaN, NaN, "K");
    return {
      temperature,
      pressure,
      vapourFraction: side === "liquid" ? 0 : 1,
      enthalpy: phase.enthalpy() / molarMass - this.referenceEnthalpy(),
      liquid: side === "liquid" ? named(z) : null,
      vapour: side === "liquid" ? null : named(z),
    };
  }

  /** J/kg on the components' own zeros, of the liquid at its bubble point at 101.325 kPa. */
  private referenceEnthalpy(): number {
    if (Number.isNaN(this.zero)) {
      const reference = equilibrium(this.z);
      reference.solve(REFERENCE_PRESSURE, 0);
      this.zero = reference.liquid.enthalpy() / this.molarMass;
    }
    return this.zero;
  }
}

/**
 * A mixture of nitrogen, argon and oxygen, by mole fractions.
 *
 * @throws RangeError when the fractions are negative or do not sum to one
 *
 * @example
 * mixture({ nitrogen: 0.7812, argon: 0.0092, oxygen: 0.2096 }).flash({ pressure: 101325, vapourFraction: 0.5 });
 */
export function mixture(composition: Composition): Mixture {
  return new Mixture(composition);
}

/**
 * Liquid and vapour of nitrogen, argon and oxygen, for searches that change the composition as they go: the fractions are read
 * from the array at every solution.
 *
 * @param z mole fractions of nitrogen, argon and oxygen, in this order
 */
export function equilibrium(z: Float64Array): Equilibrium {
  return new Equilibrium(COMPONENTS, airPairs, z, COMPONENTS.map(guessData));
}

function guessData(component: (typeof COMPONENTS)[number], index: number): GuessData {
  const { phases } = component;
  if (phases.kind !== "vapour-pressure") throw new Error(`${component.name} is no pure component`);
  return { criticalTemperature: phases.criticalTemperature, criticalPressure: phases.criticalPressure, acentricFactor: ACENTRIC_FACTORS[index] };
}

function named(x: Float64Array): Composition {
  return { nitrogen: x[0], argon: x[1], oxygen: x[2] };
}

function check(quantity: string, value: number, minimum: number, maximum: number, unit: string): void {
  if (value >= minimum && value <= maximum) return;
  throw new OutOfRangeError("mixture of nitrogen, argon and oxygen", { quantity, value, minimum, maximum, unit });
}
