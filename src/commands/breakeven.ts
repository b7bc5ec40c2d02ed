import { ANSWERED, fileArgument, NO_STEADY_STATE, optionText, settingsOf, setOption, type Command } from "./command.js";

/** Finds the value at which a condition turns. */
export const breakeven: Command = {
  name: "breakeven",
  summary: "find the value of a number at which the machine begins to liquefy, or another condition turns",
  arguments: [fileArgument],
  options: [
    { flag: "--vary", value: "NAME.key", help: "the number to move, if need be with its range: L1.heat='0 W..100 W'" },
    { flag: "--until", value: "CONDITION", help: "liquefies, or a result compared with a value: 'capacity > 20 W'", default: "liquefies" },
    { flag: "--json", help: "print the answer as JSON, SI units" },
    setOption,
  ],
  examples: [
    ["rimeloop breakeven cycles/bench-cooler.yaml --vary T1.efficiency", "the expander efficiency from which liquid forms"],
    ["rimeloop breakeven cycles/bench-cooler.yaml --vary L1.heat=1..500W --until 'cold-end.temperature < 100 K'", "the heat up to which the cold end stays below 100 K"],
  ],
  async run(input, terminal) {
    const { loadCycleFile } = await import("../cyclefile/load.js");
    const { parseVariation } = await import("../studies/variation.js");
    const { parseCondition } = await import("../studies/condition.js");
    const { breakEven } = await import("../studies/breakeven.js");
    const { breakEvenText, breakEvenJson } = await import("../present/breakeven.js");
    const { requiredOption } = await import("./vary.js");
    const vary = requiredOption(input, "vary", "the number to move, as in T1.efficiency");
    const overrides = await settingsOf(input);
    const file = await loadCycleFile(input.arguments[0] ?? "", overrides);
    const condition = parseCondition(optionText(input, "until") ?? "liquefies", file.define(overrides));
    const { variable, range } = parseVariation(vary, file, overrides, 2);
    const answer = breakEven(file, variable, condition, { range, overrides });
    terminal.write(input.options.json === true ? JSON.stringify(breakEvenJson(answer), null, 2) : breakEvenText(answer));
    return answer.solved ? ANSWERED : NO_STEADY_STATE;
  },
};
