import pc from "picocolors";
import type { CycleDefinition } from "../cycle/definition.js";
import type { CycleResult, ProfilePoint } from "../cycle/result.js";
import { cautionsText } from "./cautions.js";
import { blockFigures } from "./figures.js";
import { lossTable } from "./losses.js";
import { moistureText } from "./moisture.js";
import { fixed } from "./numbers.js";
import { profileChart } from "./profile-chart.js";
import { schematic } from "./schematic.js";
import { stationTable } from "./stations.js";
import { summary } from "./summary.js";
import { wetStations } from "./wet-stations.js";
import { wrap } from "./wrap.js";

/** All that `run` prints of a machine and its result, at most 100 columns wide. */
export function report(definition: CycleDefinition, result: CycleResult, colour: boolean): string {
  const { bold } = pc.createColors(colour);
  const section = (title: string, body: string): string => `${bold(title)}\n\n${body}`;
  const { fluid, circuit, surroundings } = result;
  const setting = `${fluid}, ${circuit} circuit, surroundings ${fixed(surroundings.temperature - 273.15, 1)} degC`;
  const charts = result.blocks.flatMap(({ name, profile }) =>
    Array.isArray(profile) ? [section(`Temperatures in ${name}`, profileChart(profile as ProfilePoint[], colour))] : [],
  );
  return [
    `${bold(wrap(result.title))}\n${setting}`,
    summary(result),
    warningLines(result, colour),
    section("The machine", schematic(definition, result)),
    section("State points", stationTable(result.stations)),
    wetStations(result.stations),
    section("Blocks", blockFigures(result.blocks)),
    ...charts,
    ...(result.moisture === null ? [] : [section("Moisture and carbon dioxide", moistureText(result.moisture))]),
    section("Where the power goes", lossTable(result.exergy)),
    audited(result),
    ...(result.cautions.length === 0 ? [] : [section("Cautions", cautionsText(result.cautions))]),
  ]
    .filter((part) => part !== "")
    .join("\n\n");
}

/** What the user should know before reading on. */
function warningLines({ solver, warnings }: CycleResult, colour: boolean): string {
  const { yellow } = pc.createColors(colour);
  const lines = warnings.map(({ message, block }) => wrap(`Warning${block === null ? "" : `, ${block}`}: ${message}`).replace("Warning", yellow("Warning")));
  if (solver.otherSteadyStates) {
    lines.push(wrap("A colder steady state exists too; this is the warmest, which a machine cooling down from the surroundings reaches first."));
  }
  return lines.join("\n");
}

function audited({ solver: { residual, iterations }, audit: { energy, exergy } }: CycleResult): string {
  const [first, second, worst] = [energy, exergy, residual].map((part) => part.toExponential(0));
  return `Audit: first law closes to ${first}, second law to ${second}, worst block to ${worst}; ${iterations} passes.`;
}
