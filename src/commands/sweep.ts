import { ANSWERED, fileArgument, NO_STEADY_STATE, optionText, optionTexts, settingsOf, setOption, type Command, type Input, type Terminal } from "./command.js";
import type { BreakEven } from "../studies/breakeven.js";
import type { ResultQuantity } from "../studies/quantities.js";
import type { Swept, SweepRow } from "../studies/sweep.js";

/** Points of a range where the user gives no number: of one range, and of each of two. */
const STEPS = 26;
const MAP_STEPS = [13, 9] as const;
/** Intervals scanned for the break-even in each column of a map. */
const SCANNED_IN_MAP = 20;
const SHOWN = "cold-end.temperature,capacity,net-power,cop,liquid.fraction";
const SHOWN_IN_MAP = "cold-end.temperature";

/** Solves a machine over a range of one number or two. */
export const sweep: Command = {
  name: "sweep",
  summary: "solve the machine over a range: a table and a chart, or a map of two numbers",
  arguments: [fileArgument],
  options: [
    { flag: "--vary", value: "NAME.key=FROM..TO", help: "the number to move: T1.efficiency=30%..80%, or a list C1.stages=1,2,3; given twice it makes a map", repeatable: true },
    { flag: "--steps", value: "N", help: `points of a range, both ends counted: ${STEPS} unless given; of a map ${MAP_STEPS.join(",")}` },
    { flag: "--show", value: "RESULTS", help: `results, with commas between: ${SHOWN.replaceAll(",", ", ")}, second-law-efficiency, T1.outlet-temperature, …` },
    { flag: "--until", value: "CONDITION", help: "condition whose break-even is marked, as in breakeven", default: "liquefies" },
    { flag: "--format", value: "FORMAT", help: "text, csv (all digits) or json (SI)", choices: ["text", "csv", "json"], default: "text" },
    { flag: "--out", value: "FILE", help: "write to a file; csv and json row by row, as machines are solved" },
    { flag: "--force", help: "let --out replace a file that exists" },
    setOption,
  ],
  examples: [
    ["rimeloop sweep cycles/bench-cooler.yaml --vary T1.efficiency=30%..80%", "what a better turbine brings"],
    ["rimeloop sweep cycles/bench-cooler.yaml --vary T1.efficiency=30..80% --vary HX1.approach=2..12K", "which pairs liquefy"],
    ["rimeloop sweep cycles/bench-cooler.yaml --vary flow=4..12g/s --format csv --out flow.csv", "a table for a spreadsheet"],
  ],
  async run(input, terminal) {
    const { loadCycleFile } = await import("../cyclefile/load.js");
    const { parseVariation } = await import("../studies/variation.js");
    const { resultQuantity } = await import("../studies/quantities.js");
    const { parseCondition } = await import("../studies/condition.js");
    const { breakEven } = await import("../studies/breakeven.js");
    const study = await import("../studies/sweep.js");
    const { optionFault, stepsOf } = await import("./vary.js");

    const texts = optionTexts(input, "vary");
    if (texts.length < 1 || texts.length > 2) throw optionFault("vary", "", "one number with its range, as in T1.efficiency=30%..80%, or two");
    const overrides = await settingsOf(input);
    const file = await loadCycleFile(input.arguments[0] ?? "", overrides);
    const definition = file.define(overrides);
    const steps = stepsOf(optionText(input, "steps"), texts.length === 1 ? [STEPS] : MAP_STEPS);
    const swept = texts.map((text, i): Swept => {
      const { variable, values } = parseVariation(text, file, overrides, steps[i]);
      if (values === undefined) throw optionFault("vary", text, `a range or a list, as in ${text}=FROM..TO`);
      return { variable, values };
    });
    const shown = (optionText(input, "show") ?? (texts.length === 1 ? SHOWN : SHOWN_IN_MAP)).split(",").map((name) => resultQuantity(name.trim(), definition));
    const condition = parseCondition(optionText(input, "until") ?? "liquefies", definition);
    const rows = study.sweep(file, swept, shown, overrides);
    const turns = (): BreakEven[] => {
      const [{ variable, values }, second] = swept;
      const range = [Math.min(...values), Math.max(...values)] as const;
      if (variable.whole || range[0] === range[1]) return [];
      if (second === undefined) return [breakEven(file, variable, condition, { range, overrides })];
      return second.values.map((value) => breakEven(file, variable, condition, { range, overrides: [...overrides, second.variable.override(value)], scanned: SCANNED_IN_MAP }));
    };
    return answer(input, terminal, swept, shown, rows, turns);
  },
};

/** Writes rows in the format and to the place asked for; the exit status says whether any machine could be solved. */
async function answer(input: Input, terminal: Terminal, swept: readonly Swept[], shown: readonly ResultQuantity[], rows: Iterable<SweepRow>, turns: () => BreakEven[]): Promise<number> {
  const format = optionText(input, "format") ?? "text";
  const path = optionText(input, "out");
  const { openOutput } = await import("./output.js");
  const output = await openOutput(path, input.options.force === true, terminal);
  let solved = false;
  try {
    if (format === "text") {
      const { sweepText } = await import("../present/sweep-text.js");
      const all = [...rows];
      solved = all.some(({ status }) => status === "solved");
      output.write(`${sweepText(swept, shown, all, turns())}\n`);
    } else {
      const { csvRows, jsonRows } = await import("../present/sweep-rows.js");
      const writer = (format === "csv" ? csvRows : jsonRows)(swept, shown);
      output.write(writer.start);
      for (const row of rows) {
        solved ||= row.status === "solved";
        output.write(writer.row(row));
      }
      output.write(writer.end(format === "json" ? turns() : []));
    }
  } finally {
    output.close();
  }
  return solved ? ANSWERED : NO_STEADY_STATE;
}
