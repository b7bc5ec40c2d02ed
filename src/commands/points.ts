import { ANSWERED, fileArgument, optionText, settingsOf, setOption, type Command } from "./command.js";

/** Prints the state-point table. */
export const points: Command = {
  name: "points",
  summary: "print the state-point table for the build plan",
  arguments: [fileArgument],
  options: [
    { flag: "--format", value: "FORMAT", help: "text, csv (all digits) or md", choices: ["text", "csv", "md"], default: "text" },
    setOption,
  ],
  examples: [["rimeloop points cycles/bench-cooler.yaml --format csv > points.csv", "the table for a spreadsheet"]],
  async run(input, terminal) {
    const { solveFile } = await import("./solve-file.js");
    const { stationTable } = await import("../present/stations.js");
    const { result } = await solveFile(input.arguments[0] ?? "", await settingsOf(input), { threshold: false, composition: false });
    terminal.write(stationTable(result.stations, optionText(input, "format") as "text" | "csv" | "md"));
    return ANSWERED;
  },
};
