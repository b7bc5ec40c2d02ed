import { given, required } from "./definition.js";
import type { BlockKind, Port, Setting } from "./kind.js";
import { flash, surely } from "./ports.js";
import { efficiencyKey, outletPressure, pressureRatio, stages, stagesProblems } from "./shared-keys.js";
import { State } from "../fluids/state.js";
import type { Unit } from "./unit.js";

/** Vapour fraction behind a wheel below which droplets count as harmful (common practice, no source). */
const DRY_ENOUGH = 0.9;

/** Expands the gas with work. */
export const expander: BlockKind = {
  kind: "expander",
  summary: "Expands the gas with work, in one stage or several of equal pressure ratio.",
  keys: [
    outletPressure,
    pressureRatio("inlet pressure over outlet pressure"),
    efficiencyKey("efficiency", "isentropic efficiency of each stage's wheel", { required: true }),
    stages,
    {
      type: "number",
      name: "seal-leak",
      dimension: "fraction",
      range: { lowest: 0, highest: 1, open: "highest" },
      help: "share of the flow that passes each wheel unexpanded and mixes in behind it",
      default: 0,
    },
    efficiencyKey("mechanical-efficiency", "power at the shaft over power out of the gas", { default: 1 }),
    { type: "block", name: "drives", kind: "compressor", help: "the compressor on its shaft; one without an outlet pressure gets what the power allows" },
  ],
  alternatives: [{ name: "pressure" }],
  figures: [
    { name: "power", label: "power out of the gas", dimension: "power" },
    { name: "shaftPower", label: "power at the shaft", dimension: "power" },
    { name: "pressureRatio", label: "pressure ratio", dimension: "none" },
    { name: "stagePressureRatio", label: "ratio of each stage", dimension: "none" },
    { name: "inletTemperature", label: "gas arrives at", dimension: "temperature" },
    { name: "outletTemperature", label: "gas leaves at", dimension: "temperature" },
    { name: "outletVapourFraction", label: "vapour fraction behind it", dimension: "fraction" },
    { name: "isentropicEnthalpyDrop", label: "isentropic enthalpy drop", dimension: "specific enthalpy" },
  ],
  liquefactionKey: "efficiency",
  drivesKey: "drives",
  check: ([entry]) => stagesProblems(surely(entry)),
  pressureChange: "falls",
  outletPressure(entry, inletPressure) {
    const outlet = given(entry, "outlet-pressure");
    if (outlet !== undefined || inletPressure === undefined) return outlet;
    return inletPressure / (given(entry, "pressure-ratio") ?? NaN);
  },
  place: ([port], setting) => placeExpander(surely(port), setting),
};

function placeExpander({ entry, inlet, outlet }: Port, { fluid }: Setting): Unit {
  const count = given(entry, "stages") ?? 1;
  // What leaks past the wheel keeps its enthalpy, so the mixture behind it has lost that much less.
  const expanded = required(entry, "efficiency") * (1 - (given(entry, "seal-leak") ?? 0));
  const mechanicalEfficiency = given(entry, "mechanical-efficiency") ?? 1;
  const drives = typeof entry.values.drives === "string";
  const stageRatio = (): number => (inlet.pressure / outlet.pressure) ** (1 / count);
  const scratch = new State();
  const power = (): number => inlet.massFlow * (inlet.enthalpy - outlet.enthalpy);
  return {
    name: entry.name,
    kind: entry.kind,
    evaluate() {
      const ratio = stageRatio();
      let pressure = inlet.pressure;
      let enthalpy = inlet.enthalpy;
      let state = inlet.state;
      for (let stage = 1; stage <= count; stage++) {
        const behind = stage === count ? outlet.pressure : pressure / ratio;
        const entropy = fluid.pressureEnthalpy(pressure, enthalpy, state).entropy;
        const ideal = fluid.pressureEntropy(behind, entropy, scratch).enthalpy;
        enthalpy -= expanded * (enthalpy - ideal);
        pressure = behind;
        state = scratch;
      }
      outlet.enthalpy = enthalpy;
    },
    energyFlows: () => ({ work: -power(), drive: 0, heat: [], delivered: drives ? power() * mechanicalEfficiency : 0, lostIn: drives ? "bearings" : "brake" }),
    shaftPower: () => (drives ? power() * mechanicalEfficiency : 0),
    figures() {
      const before = flash(fluid, inlet);
      const after = flash(fluid, outlet);
      const ideal = fluid.pressureEntropy(outlet.pressure, before.entropy, scratch).enthalpy;
      return {
        power: power(),
        shaftPower: power() * mechanicalEfficiency,
        pressureRatio: inlet.pressure / outlet.pressure,
        stagePressureRatio: stageRatio(),
        inletTemperature: before.temperature,
        outletTemperature: after.temperature,
        outletVapourFraction: Number.isNaN(after.vapourFraction) ? null : after.vapourFraction,
        isentropicEnthalpyDrop: before.enthalpy - ideal,
      };
    },
    warnings() {
      const arriving = flash(fluid, inlet).vapourFraction;
      const leaving = flash(fluid, outlet).vapourFraction;
      const warning = (code: string, message: string) => [{ code, block: entry.name, message }];
      if (arriving < 1) {
        return warning("wet-inlet", `the gas arrives wet (vapour fraction ${arriving.toFixed(3)}): droplets in the nozzle erode the wheel, and the efficiency given for dry gas will not be reached.`);
      }
      if (leaving < DRY_ENOUGH) {
        return warning("wet-outlet", `a vapour fraction of ${leaving.toFixed(3)} behind the wheel: below about ${DRY_ENOUGH} droplets cost efficiency and wear the wheel (common practice, no source).`);
      }
      return [];
    },
  };
}
