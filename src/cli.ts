#!/usr/bin/env node
import { readFileSync } from "node:fs";
import { Command as Program, CommanderError, Option as ProgramOption } from "commander";
import { ANSWERED, WRONG_INPUT, type Command, type Terminal } from "./commands/command.js";
import { explain } from "./commands/failure.js";
import { commands } from "./commands/registry.js";

const onTerminal = process.stdout.isTTY === true;
const terminal: Terminal = {
  write: (text) => void process.stdout.write(text.endsWith("\n") ? text : `${text}\n`),
  tell: (text) => void process.stderr.write(text.endsWith("\n") ? text : `${text}\n`),
  clear: () => void (onTerminal && process.stdout.write("\u001B[2J\u001B[3J\u001B[H")),
  colour: onTerminal && (process.env.NO_COLOR ?? "") === "" && process.env.TERM !== "dumb",
};

function register(program: Program, command: Command): void {
  const entry = program.command(command.name).summary(command.summary).description(command.summary);
  for (const { name, help, optional } of command.arguments) entry.argument(optional === true ? `[${name}]` : `<${name}>`, help);
  for (const { flag, value, help, choices, default: fallback, repeatable } of command.options) {
    const option = new ProgramOption(value === undefined ? flag : `${flag} <${value}>`, help);
    if (choices !== undefined) option.choices(choices);
    if (fallback !== undefined) option.default(fallback, fallback.replaceAll(",", ", "));
    if (repeatable === true) option.argParser((text: string, before: string[] | undefined) => [...(before ?? []), text]);
    entry.addOption(option);
  }
  const examples = command.examples.map(([line, answer]) => `  ${line}\n      ${answer}`).join("\n");
  entry.addHelpText("after", `\nExamples:\n${examples}`);
  entry.showHelpAfterError(`rimeloop ${command.name} --help says what it takes.`);
  entry.action(async (...given: unknown[]) => {
    const words = given.slice(0, command.arguments.length) as (string | undefined)[];
    const options = given[command.arguments.length] as Record<string, string | boolean | string[]>;
    process.exitCode = await command.run({ arguments: words, options }, terminal);
  });
}

// A reader that stops early, such as head, is no error.
for (const stream of [process.stdout, process.stderr]) {
  stream.on("error", (error: NodeJS.ErrnoException) => {
    if (error.code === "EPIPE") process.exit();
    throw error;
  });
}

const { version } = JSON.parse(readFileSync(new URL("../package.json", import.meta.url), "utf8")) as { version: string };

const program = new Program("rimeloop")
  .description("Steady state of small reverse-Brayton air coolers and liquefiers with real-gas properties")
  .version(version, "--version", "print the version")
  .helpOption("-h, --help", "print this help")
  .helpCommand("help [COMMAND]", "print the help of a command")
  .addHelpText("after", `\nTo begin with:\n${commands.map(({ examples: [[line]] }) => `  ${line}`).join("\n")}\n\nrimeloop COMMAND --help says more of each.`)
  .configureHelp({ helpWidth: 100 })
  .exitOverride()
  .showHelpAfterError("rimeloop --help lists the commands.")
  .showSuggestionAfterError();
for (const command of commands) register(program, command);

try {
  await program.parseAsync();
} catch (error) {
  if (error instanceof CommanderError) process.exitCode = error.exitCode === 0 ? ANSWERED : WRONG_INPUT;
  else process.exitCode = await explain(error, terminal);
}
