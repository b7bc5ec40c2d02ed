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

/** The compression that a compressor's definition asks for, by whichever of the three efficiencies it gives; temperature in K. */
export function compression(definition: BlockDefinition, fluid: Fluid, surroundingsTemperature: number): Compression {
  const polytropic = given(definition, "polytropic-efficiency");
  if (polytropic !== undefined) return polytropicCompression(fluid, polytropic);
  const isothermal = given(definition, "isothermal-efficiency");
  if (isothermal !== undefined) return isothermalCompression(fluid, isothermal, surroundingsTemperature);
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

/** Steps over a stage; twice as many agree to 1e-8 at a pressure ratio of 10. */
const POLYTROPIC_STEPS = 16;

/**
 * Every small pressure rise takes dh = v dp / efficiency: integrated over the logarithm of the pressure, in which the
 * slope p v / efficiency of a gas hardly changes, by the classical Runge-Kutta method.
 */
function polytropicCompression(fluid: Fluid, efficiency: number): Compression {
  const state = new State();
  const stage: Stage = { work: 0, enthalpy: 0, temperature: 0 };
  const slope = (pressure: number, enthalpy: number): number =>
    pressure / (fluid.pressureEnthalpy(pressure, enthalpy, state).density * efficiency);

  return (pressure, enthalpy, outletPressure) => {
    const width = Math.log(outletPressure / pressure) / POLYTROPIC_STEPS;
    const toMiddle = Math.exp(width / 2);
    let from = pressure;
    let current = enthalpy;
    for (let step = 0; step < POLYTROPIC_STEPS; step++) {
      const middle = from * toMiddle;
      const to = middle * toMiddle;
      const atStart = slope(from, current);
      const atMiddle = slope(middle, current + (atStart * width) / 2);
      const atMiddleAgain = slope(middle, current + (atMiddle * width) / 2);
      const atEnd = slope(to, current + atMiddleAgain * width);
      current += ((atStart + 2 * atMiddle + 2 * atMiddleAgain + atEnd) * width) / 6;
      from = to;
    }
    stage.work = current - enthalpy;
    stage.enthalpy = current;
    stage.temperature = fluid.pressureEnthalpy(outletPressure, current, state).temperature;
    return stage;
  };
}

/**
 * A machine cooled so well that the gas is compressed at one temperature and leaves with it: that of the surroundings, or of the
 * inlet where it is warmer. Real work = the least that such a machine needs, (h2 - h1) - T (s2 - s1), over efficiency; what
 * the gas does not keep goes to the cooling.
 */
function isothermalCompression(fluid: Fluid, efficiency: number, surroundingsTemperature: number): Compression {
  const state = new State();
  const stage: Stage = { work: 0, enthalpy: 0, temperature: 0 };
  return (pressure, enthalpy, outletPressure) => {
    const inlet = fluid.pressureEnthalpy(pressure, enthalpy, state);
    const { entropy } = inlet;
    const temperature = Math.max(inlet.temperature, surroundingsTemperature);
    fluid.temperaturePressure(temperature, outletPressure, state);
    const reversible = state.enthalpy - enthalpy - temperature * (state.entropy - entropy);
    stage.work = reversible / efficiency;
    stage.enthalpy = state.enthalpy;
    stage.temperature = temperature;
    return stage;
  };
}
