import { ANSWERED, fileArgument, settingsOf, setOption, type Command } from "./command.js";

/** Reads and checks a file without solving it. */
export const check: Command = {
  name: "check",
  summary: "read and check a cycle file without solving it",
  arguments: [fileArgument],
  options: [setOption],
  examples: [["rimeloop check cycles/bench-cooler.yaml", "every fault of the file at once, or what was understood"]],
  async run(input, terminal) {
    const { loadCycleFile } = await import("../cyclefile/load.js");
    const { understood } = await import("../present/understood.js");
    const settings = await settingsOf(input);
    const definition = (await loadCycleFile(input.arguments[0] ?? "", settings)).define(settings);
    terminal.write(understood(definition));
    return ANSWERED;
  },
};
