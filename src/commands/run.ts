import { ANSWERED, fileArgument, settingsOf, setOption, type Command, type Input, type Terminal } from "./command.js";

/** Solves a machine and says what it does. */
export const run: Command = {
  name: "run",
  summary: "solve a machine: what it reaches, its state points, what limits it, what is dangerous",
  arguments: [fileArgument],
  options: [
    { flag: "--json", help: "print the whole result as JSON, SI units" },
    { flag: "--watch", help: "run again whenever the file changes" },
    setOption,
  ],
  examples: [
    ["rimeloop run cycles/bench-cooler.yaml", "the machine as it stands in the file"],
    ["rimeloop run cycles/bench-cooler.yaml --set L1.heat='50 W' --set T1.efficiency=60%", "the same with another load and turbine"],
  ],
  async run(input, terminal) {
    if (input.options.watch !== true) return runOnce(input, terminal);
    const { watchFile } = await import("./watch.js");
    return watchFile(input.arguments[0] ?? "", terminal, () => runOnce(input, terminal));
  },
};

async function runOnce(input: Input, terminal: Terminal): Promise<number> {
  const { solveFile } = await import("./solve-file.js");
  const { definition, result } = await solveFile(input.arguments[0] ?? "", await settingsOf(input));
  if (input.options.json === true) {
    const { jsonText } = await import("../present/json.js");
    terminal.write(jsonText(result));
    return ANSWERED;
  }
  const { report } = await import("../present/report.js");
  terminal.write(report(definition, result, terminal.colour));
  return ANSWERED;
}
