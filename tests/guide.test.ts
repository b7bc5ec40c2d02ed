import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { Command as Program, Option as ProgramOption } from "commander";
import { describe, expect, it } from "vitest";
import { ANSWERED, type Input } from "../src/commands/command.js";
import { commands } from "../src/commands/registry.js";
import { resultQuantities } from "../src/studies/quantities.js";

const root = fileURLToPath(new URL("../", import.meta.url));
const guide = readFileSync(`${root}docs/guide.md`, "utf8");
/** The guide's command lines; what would write a file or go on for ever is only parsed. */
const lines = [...guide.matchAll(/^rimeloop (.+)$/gm)].map(([, line]) => line);

function words(line: string): string[] {
  return [...line.replace(/ > .*/, "").matchAll(/((?:'[^']*'|\S)+)/g)].map(([word]) => word.replaceAll("'", ""));
}

describe("the guide", () => {
  it.each(lines)("rimeloop %s", async (line) => {
    const [name, ...rest] = words(line);
    const command = commands.find((each) => each.name === name);
    if (command === undefined) throw new Error(`no command ${name}`);
    let input: Input | undefined;
    const program = new Program(name).exitOverride();
    for (const { name: argument, optional } of command.arguments) program.argument(optional === true ? `[${argument}]` : `<${argument}>`);
    for (const { flag, value, choices, default: fallback, repeatable } of command.options) {
      const option = new ProgramOption(value === undefined ? flag : `${flag} <${value}>`);
      if (choices !== undefined) option.choices(choices);
      if (fallback !== undefined) option.default(fallback);
      if (repeatable === true) option.argParser((text: string, before: string[] | undefined) => [...(before ?? []), text]);
      program.addOption(option);
    }
    program.action(() => {
      input = { arguments: program.args.map((argument) => (argument.startsWith("cycles/") ? root + argument : argument)), options: program.opts() };
    });
    program.parse(rest, { from: "user" });
    if (input === undefined || line.includes("--out") || line.includes("--watch")) return;
    let out = "";
    const status = await command.run(input, { write: (text) => void (out += text), tell: () => {}, clear: () => {}, colour: false });
    expect(status).toBe(ANSWERED);
    for (const text of line.includes("csv") ? [] : out.split("\n")) expect(text.length, text).toBeLessThanOrEqual(100);
  });

  it("lists every result", () => {
    for (const { name, help } of resultQuantities) expect(guide).toContain(`| \`${name}\` | ${help} |`);
  });

  it("names every command", () => {
    for (const { name } of commands) expect(lines.some((line) => line.startsWith(`${name} `)), name).toBe(true);
  });
});
