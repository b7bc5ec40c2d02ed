import pc from "picocolors";
import type { CycleResult, ProfilePoint } from "../cycle/result.js";
import { cautionsText } from "./cautions.js";
import { blockFigures } from "./figures.js";
import { moistureText } from "./moisture.js";
import { fixed, percent, watts } from "./numbers.js";
import { profileChart } from "./profile-chart.js";
import { stationTable } from "./stations.js";
import { summary } from "./summary.js";
import { textTable } from "./table.js";
import { wetStations } from "./wet-stations.js";
import { wrap } from "./wrap.js";

/** All that `run` prints of a result, at most 100 columns wide. */
export function report(result: CycleResult, colour: boolean): string {
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
    warningLines(result),
    section("State points", stationTable(result.stations)),
    wetStations(result.stations),
    section("Blocks", blockFigures(result.blocks)),
    ...charts,
    ...(result.moisture === null ? [] : [section("Moisture and carbon dioxide", moistureText(result.moisture))]),
    section("Where the power goes", losses(result)),
    audited(result),
    ...(result.cautions.length === 0 ? [] : [section("Cautions", cautionsText(result.cautions))]),
  ]
    .filter((part) => part !== "")
    .join("\n\n");
}

/** Longest bar of the table of losses. */
const BAR = 40;

function losses({ exergy }: CycleResult): string {
  const rows = exergy
    .filter(({ share }) => share >= 5e-4)
    .toSorted((a, b) => b.destroyed - a.destroyed)
    .map(({ block, destroyed, share }) => [block, watts(destroyed), percent(share), "#".repeat(Math.round(share * BAR))]);
  return textTable(
    [
      { heading: "exergy lost in", align: "left" },
      { heading: "", unit: "" },
      { heading: "share" },
      { heading: "", align: "left" },
    ],
    rows,
  );
}

/** What the user should know before reading on. */
function warningLines({ solver, warnings }: CycleResult): string {
  const lines = warnings.map(({ message, block }) => wrap(`Warning${block === null ? "" : `, ${block}`}: ${message}`));
  if (solver.otherSteadyStates) {
    lines.push(wrap("A colder steady state exists too; this is the warmest, which a machine cooling down from the surroundings reaches first."));
  }
  return lines.join("\n");
}

function audited({ solver: { residual, iterations }, audit: { energy, exergy } }: CycleResult): string {
  const [first, second, worst] = [energy, exergy, residual].map((part) => part.toExponential(0));
  return `Audit: first law closes to ${first}, second law to ${second}, worst block to ${worst}; ${iterations} passes.`;
}
