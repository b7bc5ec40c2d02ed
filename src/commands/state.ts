import { ANSWERED, optionText, WRONG_INPUT, type Command } from "./command.js";

/** Prints properties of one state or of a table of states. */
export const state: Command = {
  name: "state",
  summary: "print the properties of a fluid at one state, or at every state of a table",
  arguments: [
    { name: "FLUID", help: "air, nitrogen, …" },
    { name: "FIRST", help: "one of the two values that fix the state, told by its unit: '100 K', '5 bar', '200 kJ/kg', '3 kJ/(kg K)', '50 %' vapour, '4 kg/m3'", optional: true },
    { name: "SECOND", help: "the other", optional: true },
  ],
  options: [
    { flag: "--from", value: "CSV", help: "a table of states instead; its heading names two of temperature, pressure, enthalpy, entropy, vapour, density, each with its unit: temperature (K)" },
    { flag: "--format", value: "FORMAT", help: "text, csv (all digits), md or json (SI)", choices: ["text", "csv", "md", "json"], default: "text" },
  ],
  examples: [
    ["rimeloop state air '100 K' '5 bar'", "from temperature and pressure"],
    ["rimeloop state air '1 atm' '50 %'", "half vapour at atmospheric pressure"],
    ["rimeloop state air --from points.csv --format csv", "a column of states, as points --format csv writes it"],
  ],
  async run(input, terminal) {
    const [name = "", first, second] = input.arguments;
    const format = optionText(input, "format") ?? "text";
    const from = optionText(input, "from");
    const { fluid } = await import("../fluids/registry.js");
    const gas = fluid(name);
    const { stateSheet, stateList } = await import("../present/states.js");
    if (from !== undefined) {
      const { readStates } = await import("./state-table.js");
      const rows = await readStates(from, gas);
      terminal.write(format === "json" ? JSON.stringify(rows.map(({ state: at, fault }) => at ?? { fault }), null, 2) : stateList(rows, format as "text" | "csv" | "md"));
      return rows.some(({ fault }) => fault !== undefined) ? WRONG_INPUT : ANSWERED;
    }
    const { stateInput } = await import("./state-input.js");
    const at = gas.at(stateInput([first, second]));
    if (format === "json") terminal.write(JSON.stringify(at, null, 2));
    else if (format === "text") terminal.write(stateSheet(name, at));
    else terminal.write(stateList([{ state: at }], format as "csv" | "md"));
    return ANSWERED;
  },
};
