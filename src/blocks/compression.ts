import type { Fluid } from "../fluids/fluid.js";
import { State } from "../fluids/state.js";
import { given, type BlockDefinition } from "./definition.js";

/** What one stage does to the gas. */
export interface Stage {
  /** J/kg into the gas */
  work: number;
  /** J/kg at the outlet */
  enthalpy: number;
  /** K at the outlet */
  temperature: number;
}

/** Compresses from a pressure (Pa) and enthalpy (J/kg) to a higher pressure; the stage returned is reused. */
export type Compression = (pressure: number, enthalpy: number, outletPressure: number) => Stage;

/** The compression that a compressor's definition asks for, by whichever of the three efficiencies it gives. */
export function compression(definition: BlockDefinition, fluid: Fluid): Compression {
  const polytropic = given(definition, "polytropic-efficiency");
  if (polytropic !== undefined) return polytropicCompression(fluid, polytropic);
  const isothermal = given(definition, "isothermal-efficiency");
  if (isothermal !== undefined) return isothermalCompression(fluid, isothermal);
  return isentropicCompression(fluid, given(definition, "efficiency") ?? 1);
}

/** Real work = isentropic work over efficiency. */
function isentropicCompression(fluid: Fluid, efficiency: number): Compression {
  const state = new State();
  const stage: Stage = { work: 0, enthalpy: 0, temperature: 0 };
  return (pressure, enthalpy, outletPressure) => {
    const entropy = fluid.pressureEnthalpy(pressure, enthalpy, state).entropy;
    const ideal = fluid.pressureEntropy(outletPressure, entropy, state).enthalpy;
    stage.work = (ideal - enthalpy) / efficiency;
    stage.enthalpy = enthalpy + stage.work;
    stage.temperature = fluid.pressureEnthalpy(outletPressure, stage.enthalpy, state).temperature;
    return stage;
  };
}

/** Steps of equal pressure ratio; their number doubles until the work changes by less than `POLYTROPIC_TOLERANCE`. */
const POLYTROPIC_STEPS = 4;
const POLYTROPIC_TOLERANCE = 1e-8;
const POLYTROPIC_DOUBLINGS = 8;

/**
 * Every small pressure rise takes dh = v dp / efficiency. Each step does so at its isentropic work; the error falls with
 * the square of the step, so that two step counts give an extrapolation that is exact to the fourth.
 */
function polytropicCompression(fluid: Fluid, efficiency: number): Compression {
  const state = new State();
  const stage: Stage = { work: 0, enthalpy: 0, temperature: 0 };

  function work(pressure: number, enthalpy: number, outletPressure: number, steps: number): number {
    const ratio = (outletPressure / pressure) ** (1 / steps);
    let current = enthalpy;
    let from = pressure;
    for (let step = 1; step <= steps; step++) {
      const to = step === steps ? outletPressure : from * ratio;
      const entropy = fluid.pressureEnthalpy(from, current, state).entropy;
      current += (fluid.pressureEntropy(to, entropy, state).enthalpy - current) / efficiency;
      from = to;
    }
    return current - enthalpy;
  }

  return (pressure, enthalpy, outletPressure) => {
    let steps = POLYTROPIC_STEPS;
    let coarse = work(pressure, enthalpy, outletPressure, steps);
    let previous = NaN;
    for (let doubling = 0; doubling < POLYTROPIC_DOUBLINGS; doubling++) {
      steps *= 2;
      const fine = work(pressure, enthalpy, outletPressure, steps);
      // The step's error is of first order in its size (isentropic work over efficiency, not v dp over efficiency).
      const extrapolated = 2 * fine - coarse;
      coarse = fine;
      if (Math.abs(extrapolated - previous) <= POLYTROPIC_TOLERANCE * Math.abs(extrapolated)) {
        previous = extrapolated;
        break;
      }
      previous = extrapolated;
    }
    stage.work = previous;
    stage.enthalpy = enthalpy + stage.work;
    stage.temperature = fluid.pressureEnthalpy(outletPressure, stage.enthalpy, state).temperature;
    return stage;
  };
}

/**
 * A machine cooled so well that the gas leaves as warm as it came: real work = reversible isothermal work,
 * (h2 - h1) - T (s2 - s1), over efficiency; what the gas does not keep goes to the cooling.
 */
function isothermalCompression(fluid: Fluid, efficiency: number): Compression {
  const state = new State();
  const stage: Stage = { work: 0, enthalpy: 0, temperature: 0 };
  return (pressure, enthalpy, outletPressure) => {
    const { temperature, entropy } = fluid.pressureEnthalpy(pressure, enthalpy, state);
    fluid.temperaturePressure(temperature, outletPressure, state);
    const reversible = state.enthalpy - enthalpy - temperature * (state.entropy - entropy);
    stage.work = reversible / efficiency;
    stage.enthalpy = state.enthalpy;
    stage.temperature = temperature;
    return stage;
  };
}
