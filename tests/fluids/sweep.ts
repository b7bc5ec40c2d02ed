import type { Fluid } from "../../src/fluids/fluid.js";
import { OutOfRangeError } from "../../src/fluids/errors.js";
import { State } from "../../src/fluids/state.js";

/** Largest relative difference that a round trip may leave. */
export const ROUND_TRIP = 1e-8;
/**
 * Round-off of a pressure, over rho R T. Near the critical point (dp/drho)_T vanishes, and a density at given temperature
 * and pressure cannot be known better than by this over the slope.
 */
const PRESSURE_ROUND_OFF = 1e-14;
/** J/kg and J/(kg K) that enthalpy and entropy, of arbitrary zero, count as at least. */
const ENTHALPY_FLOOR = 1e5;
const ENTROPY_FLOOR = 1e3;
/** Pa, where sweeps of pressure start. */
const LOWEST_PRESSURE = 1;
/**
 * Two states of the model, one on either side of its end, share temperature and density where bubble and dew do not meet:
 * relative pressure within which temperature and density are not put to that question.
 */
const END_OF_MODEL = 1e-3;

/** What a sweep saw. */
export interface SweepCounts {
  fluid: string;
  states: number;
  liquid: number;
  gas: number;
  twoPhase: number;
  supercritical: number;
  /** Round trips made, and the largest relative difference that one of them left. */
  trips: number;
  worst: number;
  /** Inputs answered by an OutOfRangeError. */
  outOfRange: number;
  /** What disagreed or failed, described. */
  failures: string[];
}

/** A repeatable sequence of numbers between 0 and 1 (Park and Miller's generator). */
export function sequence(seed: number): () => number {
  let last = seed;
  return () => (last = (last * 48_271) % 2_147_483_647) / 2_147_483_647;
}

/**
 * States spread evenly in the logarithms of temperature and pressure over a fluid's whole range, every third time also one
 * in two phases and one near the critical point; from each, every pair of inputs has to lead back to it, from a cold start
 * and from a neighbouring state.
 */
export function sweep(fluid: Fluid, count: number, seed: number): SweepCounts {
  const next = sequence(seed);
  const counts: SweepCounts = {
    fluid: fluid.name,
    states: 0,
    liquid: 0,
    gas: 0,
    twoPhase: 0,
    supercritical: 0,
    trips: 0,
    worst: 0,
    outOfRange: 0,
    failures: [],
  };
  const { minimumTemperature, maximumTemperature, maximumPressure, criticalTemperature, criticalPressure } = fluid;
  const between = (low: number, high: number): number => low * (high / low) ** next();
  /** A share that is as often near 1e-4 as near 1. */
  const spread = (share: number): number => 1 + share * (2 * next() - 1) * 10 ** (-4 * next());

  for (let i = 0; i < count; i++) {
    const temperature = between(minimumTemperature, maximumTemperature);
    const pressure = between(LOWEST_PRESSURE, maximumPressure);
    const near = { temperature: temperature * spread(0.05), pressure: pressure * spread(0.1) };
    const state = attempt(counts, () => fluid.temperaturePressure(temperature, pressure, new State()));
    if (state !== undefined) roundTrips(fluid, state, counts, neighbour(fluid, near.temperature, near.pressure));
    if (i % 3 === 1) {
      const wet = attempt(counts, () =>
        fluid.pressureQuality(between(fluid.lowestSaturationPressure, criticalPressure), next(), new State()),
      );
      if (wet !== undefined) roundTrips(fluid, wet, counts);
    }
    if (i % 3 === 2) {
      const critical = attempt(counts, () =>
        fluid.temperaturePressure(criticalTemperature * spread(0.02), criticalPressure * spread(0.05), new State()),
      );
      if (critical !== undefined) roundTrips(fluid, critical, counts);
    }
  }
  return counts;
}

function neighbour(fluid: Fluid, temperature: number, pressure: number): State | undefined {
  try {
    return fluid.temperaturePressure(temperature, pressure, new State());
  } catch {
    return undefined;
  }
}

/** A state, or undefined where it is out of range; any other error is a failure. */
function attempt(counts: SweepCounts, find: () => State): State | undefined {
  try {
    return find();
  } catch (error) {
    if (error instanceof OutOfRangeError) counts.outOfRange++;
    else counts.failures.push(String(error));
    return undefined;
  }
}

function roundTrips(fluid: Fluid, state: State, counts: SweepCounts, warm?: State): void {
  const { temperature, pressure, density, enthalpy, entropy, vapourFraction, phase } = state;
  counts.states++;
  counts[phase === "two-phase" ? "twoPhase" : phase]++;
  if (!complete(state)) counts.failures.push(`incomplete ${describe(state)}`);
  const tolerance = ROUND_TRIP + densityRoundOff(fluid, state);
  const trip = (name: string, find: (into: State) => State, into = new State()): void => {
    counts.trips++;
    try {
      const error = difference(find(into), state);
      if (error > counts.worst) counts.worst = error;
      if (!(error <= tolerance)) counts.failures.push(`${name} off by ${error.toExponential(1)}: ${describe(state)}, came back ${describe(into)}`);
    } catch (error) {
      counts.failures.push(`${name}: ${String(error)}: ${describe(state)}`);
    }
  };
  trip("p,h", (into) => fluid.pressureEnthalpy(pressure, enthalpy, into));
  trip("p,s", (into) => fluid.pressureEntropy(pressure, entropy, into));
  if (warm !== undefined) {
    trip("p,h warm", (into) => fluid.pressureEnthalpy(pressure, enthalpy, into), Object.assign(new State(), warm));
    trip("p,s warm", (into) => fluid.pressureEntropy(pressure, entropy, into), Object.assign(new State(), warm));
    trip("T,p warm", (into) => (phase === "two-phase" ? state : fluid.temperaturePressure(temperature, pressure, into)), Object.assign(new State(), warm));
  }
  if (phase === "two-phase") trip("p,x", (into) => fluid.pressureQuality(pressure, vapourFraction, into));
  if (!sharesTemperatureAndDensity(fluid, state)) trip("T,rho", (into) => fluid.temperatureDensity(temperature, density, into));
}

/** Relative round-off of density at given temperature and pressure; (dp/drho)_T = w^2 cv / cp. */
function densityRoundOff(fluid: Fluid, state: State): number {
  if (state.phase === "two-phase") return 0;
  const slope = (state.speedOfSound ** 2 * state.isochoricHeatCapacity) / state.isobaricHeatCapacity;
  return (PRESSURE_ROUND_OFF * fluid.specificGasConstant * state.temperature) / slope;
}

function sharesTemperatureAndDensity(fluid: Fluid, { temperature, pressure }: State): boolean {
  if (fluid.name !== "air" || Math.abs(pressure / fluid.criticalPressure - 1) > END_OF_MODEL) return false;
  return temperature < fluid.criticalTemperature && temperature > 0.998 * fluid.criticalTemperature;
}

function complete(state: State): boolean {
  const { temperature, pressure, density, enthalpy, entropy, internalEnergy } = state;
  const always = [temperature, pressure, density, enthalpy, entropy, internalEnergy].every(Number.isFinite);
  if (state.phase === "two-phase") return always && state.vapourFraction >= 0 && state.vapourFraction <= 1;
  return always && state.isobaricHeatCapacity > 0 && state.isochoricHeatCapacity > 0 && state.speedOfSound > 0;
}

function relative(x: number, y: number, floor = 0): number {
  return Math.abs(x - y) / Math.max(Math.abs(y), floor);
}

/** Largest relative difference of two states; a difference of quality counts in full. */
function difference(a: State, b: State): number {
  const quality = Number.isNaN(b.vapourFraction) ? Number(!Number.isNaN(a.vapourFraction)) : Math.abs(a.vapourFraction - b.vapourFraction);
  return Math.max(
    relative(a.temperature, b.temperature),
    relative(a.pressure, b.pressure),
    relative(a.density, b.density),
    relative(a.enthalpy, b.enthalpy, ENTHALPY_FLOOR),
    relative(a.entropy, b.entropy, ENTROPY_FLOOR),
    quality,
  );
}

function describe({ temperature, pressure, density, enthalpy, entropy, phase }: State): string {
  return `${phase} ${temperature} K ${pressure} Pa ${density} kg/m3 ${enthalpy} J/kg ${entropy} J/(kg K)`;
}
