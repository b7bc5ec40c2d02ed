import { ANSWERED, optionText, WRONG_INPUT, type Command } from "./command.js";
import type { TableFormat } from "../present/table.js";

/** Prints properties of one state or of a table of states. */
export const state: Command = {
  name: "state",
  summary: "print the properties of a fluid at one state, or at every state of a table",
  arguments: [
    { name: "FLUID", help: "air, nitrogen, argon, oxygen, neon or helium" },
    { name: "FIRST", help: "one of the two values that fix the state, told by its unit ('100 K', '5 bar', '200 kJ/kg', '3 kJ/(kg K)', '4 kg/m3', '50 %' vapour) or its symbol (T, p, h, s, rho, x=0.5)", optional: true },
    { name: "SECOND", help: "the other", optional: true },
  ],
  options: [
    { flag: "--from", value: "CSV", help: "a table of states instead; its heading names two of temperature, pressure, enthalpy, entropy, vapour fraction, density, with units: temperature_K or temperature (K)" },
    { flag: "--format", value: "FORMAT", help: "text, csv (all digits), md or json (SI units)", choices: ["text", "csv", "md", "json"], default: "text" },
  ],
  examples: [
    ["rimeloop state air '100 K' '5 bar'", "from temperature and pressure, in any order"],
    ["rimeloop state nitrogen '1 atm' 'x=0'", "the boiling liquid at atmospheric pressure"],
    ["rimeloop state air --from points.csv --format csv", "a table of states, as points --format csv writes it; a row that has none says why"],
  ],
  async run(input, terminal) {
    const [name = "", first, second] = input.arguments;
    const format = optionText(input, "format") ?? "text";
    const from = optionText(input, "from");
    const { fluid } = await import("../fluids/registry.js");
    const gas = fluid(name);
    const { stateSheet, stateList } = await import("../present/states.js");
    const { jsonText } = await import("../present/json.js");
    if (from !== undefined) {
      if (first !== undefined) {
        terminal.tell(`--from ${from}: a table beside the value "${first}"; expected one of the two`);
        return WRONG_INPUT;
      }
      const { readStates } = await import("./state-table.js");
      const rows = await readStates(from, gas);
      terminal.write(format === "json" ? jsonText(rows) : stateList(rows, format as TableFormat));
      const without = rows.filter(({ state: at }) => at === undefined);
      for (const { line, status } of without) terminal.tell(`${from}:${line}: ${status}`);
      return without.length > 0 ? WRONG_INPUT : ANSWERED;
    }
    const { stateInput } = await import("./state-input.js");
    const at = gas.at(stateInput([first, second]));
    if (format === "json") terminal.write(jsonText(at));
    else if (format === "text") terminal.write(stateSheet(name, at));
    else terminal.write(stateList([{ line: 1, state: at, status: "ok" }], format as TableFormat));
    return ANSWERED;
  },
};
