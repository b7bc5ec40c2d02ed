import { compression, type Compression } from "./compression.js";
import { given, type BlockDefinition } from "./definition.js";
import type { BlockKind, Port, Setting } from "./kind.js";
import { intercooledPassage } from "./passage.js";
import { surely } from "./ports.js";
import type { Problem } from "./problem.js";
import { efficiencyKey, outletPressure, pressureRatio, stages, stagesProblems } from "./shared-keys.js";
import { stageRatio } from "./stages.js";
import type { Unit } from "./unit.js";

/** Raises the pressure, in one stage or in several with cooling between them. */
export const compressor: BlockKind = {
  kind: "compressor",
  summary: "Raises the gas's pressure with work, in one stage or in several with cooling between them.",
  keys: [
    outletPressure,
    pressureRatio("outlet pressure over inlet pressure"),
    efficiencyKey("efficiency", "isentropic efficiency of each stage", { alternative: "efficiency" }),
    efficiencyKey("polytropic-efficiency", "efficiency of a vanishingly small pressure rise", { alternative: "efficiency" }),
    efficiencyKey("isothermal-efficiency", "isothermal work over real work, for a machine cooled to the surroundings' temperature (or its inlet's, if warmer)", {
      alternative: "efficiency",
    }),
    stages,
    {
      type: "number",
      name: "intercool-to",
      dimension: "temperature",
      range: { lowest: 0, open: "lowest" },
      help: "temperature to which the gas is cooled between stages; left out, it is not cooled there",
    },
    {
      type: "number",
      name: "intercooler-pressure-drop",
      dimension: "pressure difference",
      range: { lowest: 0 },
      help: "pressure lost in each intercooler",
      default: 0,
    },
    { type: "flag", name: "intercooler-traps", help: "whether traps in the intercoolers take out the water that condenses from air", default: true },
    efficiencyKey("drive-efficiency", "shaft power over the power that the motor takes", { default: 1 }),
  ],
  alternatives: [{ name: "pressure", optional: true }, { name: "efficiency" }],
  mayFloat: true,
  figures: [
    { name: "power", label: "power into the gas", dimension: "power" },
    { name: "drivePower", label: "power the motor takes", dimension: "power" },
    { name: "recoveredPower", label: "power from expanders", dimension: "power" },
    { name: "pressureRatio", label: "pressure ratio", dimension: "none" },
    { name: "stagePressureRatio", label: "ratio of each stage", dimension: "none" },
    { name: "dischargeTemperature", label: "hottest discharge", dimension: "temperature" },
    { name: "stageDischargeTemperatures", label: "discharge of each stage", dimension: "temperature list" },
    { name: "heatRejected", label: "heat rejected on the way", dimension: "power" },
    { name: "isentropicEfficiency", label: "isentropic efficiency, whole machine", dimension: "fraction" },
  ],
  check: checkCompressor,
  pressureChange: "rises",
  outletPressure(entry, inletPressure) {
    const outlet = given(entry, "outlet-pressure");
    const ratio = given(entry, "pressure-ratio");
    if (outlet !== undefined || inletPressure === undefined || ratio === undefined) return outlet;
    return inletPressure * ratio;
  },
  passage: intercooledPassage,
  place: ([port], setting) => placeCompressor(surely(port), setting),
};

function checkCompressor([entry]: readonly BlockDefinition[], { surroundings }: Pick<Setting, "surroundings">): Problem[] {
  const definition = surely(entry);
  const problems: Problem[] = stagesProblems(definition);
  const intercoolTo = given(definition, "intercool-to");
  if (intercoolTo !== undefined && (given(definition, "stages") ?? 1) < 2) {
    problems.push({
      code: "intercooler-without-stages",
      entry: definition,
      key: "intercool-to",
      found: "an intercooler in a single-stage compressor",
      expected: "stages: 2 or more, or no intercool-to",
    });
  }
  if (intercoolTo !== undefined && intercoolTo < surroundings.temperature) {
    problems.push({
      code: "intercooler-below-surroundings",
      entry: definition,
      key: "intercool-to",
      found: `${intercoolTo.toFixed(2)} K, colder than the surroundings that it rejects heat to`,
      expected: `at least the surroundings' ${surroundings.temperature.toFixed(2)} K`,
    });
  }
  return problems;
}

function placeCompressor({ entry, inlet, outlet }: Port, setting: Setting): Unit {
  const { fluid, surroundings } = setting;
  const count = given(entry, "stages") ?? 1;
  const intercoolTo = given(entry, "intercool-to");
  const intercoolerDrop = given(entry, "intercooler-pressure-drop") ?? 0;
  const driveEfficiency = given(entry, "drive-efficiency") ?? 1;
  const compress: Compression = compression(entry, fluid, surroundings.temperature);
  const discharges = new Float64Array(count);
  /** J/kg into the gas, and J/kg rejected by jacket and intercoolers, as of the last evaluation. */
  let work = 0;
  let rejected = 0;
  let ratio = NaN;

  function evaluate(): void {
    let pressure = inlet.pressure;
    let enthalpy = inlet.enthalpy;
    ratio = stageRatio(inlet.pressure, outlet.pressure, count, intercoolerDrop);
    work = 0;
    rejected = 0;
    for (let stage = 0; stage < count; stage++) {
      const last = stage === count - 1;
      const behind = last ? outlet.pressure : pressure * ratio;
      const step = compress(pressure, enthalpy, behind);
      work += step.work;
      rejected += enthalpy + step.work - step.enthalpy;
      discharges[stage] = step.temperature;
      enthalpy = step.enthalpy;
      pressure = behind;
      if (last || intercoolTo === undefined) continue;
      pressure = behind - intercoolerDrop;
      // An intercooler cannot warm gas that leaves the stage colder than it.
      const cooled = step.temperature > intercoolTo ? fluid.temperaturePressure(intercoolTo, pressure, outlet.state).enthalpy : enthalpy;
      rejected += enthalpy - cooled;
      enthalpy = cooled;
    }
    outlet.enthalpy = enthalpy;
  }

  // Against the work of a machine that is not cooled, one that is would seem better than perfect.
  const isCooled = intercoolTo !== undefined || given(entry, "isothermal-efficiency") !== undefined;
  /** J/kg of a loss-free compression from inlet to outlet. */
  const isentropicWork = (): number => {
    const { entropy } = fluid.pressureEnthalpy(inlet.pressure, inlet.enthalpy, inlet.state);
    return fluid.pressureEntropy(outlet.pressure, entropy, outlet.state).enthalpy - inlet.enthalpy;
  };
  /** W from expanders on the shaft, no more than the gas takes. */
  const recovered = (): number => Math.min(setting.shaftPowerInto(entry.name), inlet.massFlow * work);
  /** W that the motor takes for the rest. */
  const motorPower = (): number => (inlet.massFlow * work - recovered()) / driveEfficiency;

  return {
    name: entry.name,
    kind: entry.kind,
    evaluate,
    energyFlows: () => ({
      work: inlet.massFlow * work,
      drive: motorPower(),
      recovered: recovered(),
      lostIn: "drive",
      heat: [{ heat: -inlet.massFlow * rejected, temperature: surroundings.temperature }],
    }),
    figures() {
      return {
        power: inlet.massFlow * work,
        drivePower: motorPower(),
        recoveredPower: recovered(),
        pressureRatio: outlet.pressure / inlet.pressure,
        stagePressureRatio: ratio,
        dischargeTemperature: Math.max(...discharges),
        stageDischargeTemperatures: Array.from(discharges),
        heatRejected: inlet.massFlow * rejected,
        isentropicEfficiency: isCooled ? undefined : isentropicWork() / work,
      };
    },
  };
}
