import type { Composition } from "../fluids/mixture.js";
import { ANSWERED, NO_STEADY_STATE, optionText, optionTexts, settingsOf, setOption, type Command, type Input, type Terminal } from "./command.js";

/** Rows of the table less one. */
const POINTS = 20;
const MOST_POINTS = 1000;
/** Pa, the zero of gauge units where no surroundings are given: the standard atmosphere. */
const ATMOSPHERE = 101325;

/** A liquid to evaporate, and where it comes from. */
interface Source {
  readonly liquid: Composition;
  readonly origin: string;
  /** Pa, the zero of gauge units */
  readonly ambient: number;
}

/** Follows the composition of a liquid that evaporates. */
export const boiloff: Command = {
  name: "boiloff",
  summary: "follow how liquid air, or what a wet machine condenses, grows richer in oxygen as it evaporates",
  arguments: [{ name: "FLUID|FILE", help: "air, for liquid air, or a cycle file of a machine that liquefies air" }],
  options: [
    { flag: "--pressure", value: "PRESSURE", help: "at which it evaporates", default: "1 atm" },
    { flag: "--points", value: "N", help: "steps of the table, from the whole liquid to the last of it", default: String(POINTS) },
    { flag: "--format", value: "FORMAT", help: "text, csv (all digits) or json (SI)", choices: ["text", "csv", "json"], default: "text" },
    setOption,
  ],
  examples: [
    ["rimeloop boiloff air", "liquid air in an open vessel and in a closed one"],
    ["rimeloop boiloff cycles/bench-cooler.yaml --set T1.efficiency=60% --set L1.heat='0 W'", "what the machine condenses, as it evaporates once the machine stops"],
    ["rimeloop boiloff air --pressure '3 bar' --points 50 --format csv", "a table for a spreadsheet"],
  ],
  async run(input, terminal) {
    const { plainQuantity } = await import("../cyclefile/quantity.js");
    const { optionFault } = await import("./vary.js");
    const points = Number(optionText(input, "points") ?? POINTS);
    if (!Number.isInteger(points) || points < 1 || points > MOST_POINTS) throw optionFault("points", optionText(input, "points") ?? "", `a whole number from 1 to ${MOST_POINTS}`);
    const source = await sourceOf(input, terminal);
    if (source === null) return NO_STEADY_STATE;

    const text = optionText(input, "pressure") ?? "1 atm";
    const pressure = plainQuantity(text, source.ambient);
    if (pressure === "not plain" || "unknownUnit" in pressure || pressure.kind !== "pressure") throw optionFault("pressure", text, "a pressure such as '1 atm', '3 bar' or '0.5 barg'");
    const study = await import("../studies/boiloff.js");
    const answer = study.boiloff(source.liquid, pressure.value, points);
    const present = await import("../present/boiloff.js");
    const format = optionText(input, "format") ?? "text";
    if (format === "json") terminal.write((await import("../present/json.js")).jsonText({ origin: source.origin, ...answer }));
    else if (format === "csv") terminal.write(present.boiloffCsv(answer));
    else terminal.write(present.boiloffText(answer, source.origin, terminal.colour));
    return ANSWERED;
  },
};

/**
 * The liquid asked about; null where a machine condenses nothing, which is then said.
 * @throws InputError where there is nothing to follow: a fluid of one component
 */
async function sourceOf(input: Input, terminal: Terminal): Promise<Source | null> {
  const { fluidNames } = await import("../fluids/registry.js");
  const { dryAir } = await import("../fluids/data/air-mixture.js");
  const [name = ""] = input.arguments;
  const [setting] = optionTexts(input, "set");
  if (fluidNames.includes(name) && setting !== undefined) throw (await import("./vary.js")).optionFault("set", setting, `a cycle file to set it in, instead of ${name}`);
  if (name === "air") return { liquid: dryAir, origin: "liquid air", ambient: ATMOSPHERE };
  if (fluidNames.includes(name)) await refuse(name, name);

  const { solveFile } = await import("./solve-file.js");
  const { result } = await solveFile(name, await settingsOf(input), { threshold: false });
  const { fluid, stations, surroundings, liquefaction } = result;
  if (fluid !== "air") await refuse(name, fluid);
  const { wetAir } = await import("../cycle/composition.js");
  const wet = stations.flatMap((station) => {
    const { vapourFraction, liquidOxygen, pressure } = station;
    const composition = liquidOxygen === null || vapourFraction === null ? null : wetAir(pressure, vapourFraction);
    return composition === null || vapourFraction === null ? [] : [{ station, vapourFraction, liquid: composition.liquid }];
  });
  if (wet.length === 0) {
    const { margin, where } = liquefaction;
    const nearest = margin === null || margin < 0 ? "" : `: behind ${where}, where it is nearest, the gas stays ${(margin / 1e3).toFixed(2)} kJ/kg above its dew point`;
    terminal.tell(`${name}: nothing condenses in this machine${nearest}. There is no liquid to evaporate.`);
    return null;
  }
  const { station, vapourFraction, liquid } = wet.reduce((wettest, each) => (each.vapourFraction < wettest.vapourFraction ? each : wettest));
  const origin = `the liquid behind ${station.after}, the machine's wettest station: ${((1 - vapourFraction) * 100).toFixed(1)} % liquid at ${(station.pressure / 1e5).toFixed(3)} bar`;
  return { liquid, origin, ambient: surroundings.pressure };
}

async function refuse(place: string, fluid: string): Promise<never> {
  const { InputError } = await import("../cyclefile/errors.js");
  throw new InputError([
    {
      code: "boiloff-fluid",
      place,
      line: 0,
      column: 0,
      found: `${fluid}, whose liquid keeps its composition as it evaporates`,
      expected: "air, or a cycle file whose fluid is air",
    },
  ]);
}
