import { readdirSync } from "node:fs";
import { describe, expect, it } from "vitest";
import type { Command } from "../../src/commands/command.js";
import { commands } from "../../src/commands/registry.js";

const folder = new URL("../../src/commands/", import.meta.url);

/** The command records that the folder's files export. */
async function recordsOfFolder(): Promise<Command[]> {
  const files = readdirSync(folder).filter((name) => name !== "registry.ts");
  const modules = await Promise.all(files.map((name) => import(new URL(name, folder).href) as Promise<Record<string, unknown>>));
  return modules.flatMap((module) => Object.values(module)).filter((value): value is Command => typeof value === "object" && value !== null && "run" in value && "summary" in value);
}

describe("the register of commands", () => {
  it("lists every command that a file exports", async () => {
    expect(new Set(commands)).toEqual(new Set(await recordsOfFolder()));
    expect(commands.length).toBeGreaterThan(3);
  });

  it("gives each a name of its own", () => {
    expect(new Set(commands.map(({ name }) => name)).size).toBe(commands.length);
  });

  it.each(commands.map((command) => [command.name, command] as const))("%s explains itself, with lines to copy", (name, command) => {
    expect(command.summary).toMatch(/\w+ \w+/);
    for (const { help } of [...command.arguments, ...command.options]) expect(help).not.toBe("");
    expect(command.examples.length).toBeGreaterThan(0);
    for (const [line, answer] of command.examples) {
      expect(line).toMatch(new RegExp(`^rimeloop ${name}\\b`));
      expect(answer).not.toBe("");
    }
    const flags = command.options.map(({ flag }) => flag);
    expect(new Set(flags).size).toBe(flags.length);
    for (const flag of flags) expect(flag).toMatch(/^--[a-z-]+$/);
  });

  it.each(commands.filter((command) => command.arguments[0]?.name === "FILE").map((command) => [command.name, command] as const))(
    "%s, which takes a file, takes settings",
    (_name, command) => expect(command.options.map(({ flag }) => flag)).toContain("--set"),
  );
});
