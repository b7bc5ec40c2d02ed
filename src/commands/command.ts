import type { Override } from "../cyclefile/define.js";

/** Where a command reads and writes. Answers go to `write`, all else to `tell`. */
export interface Terminal {
  write(text: string): void;
  tell(text: string): void;
  /** Empties the screen; does nothing where the answers go to a file or a pipe. */
  clear(): void;
  readonly colour: boolean;
}

/** A word that a command takes in its place. */
export interface Argument {
  /** UPPER CASE in help */
  readonly name: string;
  readonly help: string;
  readonly optional?: boolean;
}

/** An option: a flag where it takes no value. */
export interface Option {
  /** As typed: "--set" */
  readonly flag: string;
  /** What the value is called in help; left out for a flag. */
  readonly value?: string;
  readonly help: string;
  readonly choices?: readonly string[];
  readonly default?: string;
  /** May be given more than once. */
  readonly repeatable?: boolean;
}

/** What the user typed: arguments in their order, options by their name without the dashes, camelCase. */
export interface Input {
  readonly arguments: readonly (string | undefined)[];
  readonly options: Readonly<Record<string, string | boolean | readonly string[] | undefined>>;
}

/** Exit statuses. */
export const ANSWERED = 0;
export const NO_STEADY_STATE = 1;
export const WRONG_INPUT = 2;
/** A fault of the program itself, told apart from every answer. */
export const FAULT = 70;

/** A command of the program: one record says everything that help and the command line know of it. */
export interface Command {
  readonly name: string;
  /** One line. */
  readonly summary: string;
  readonly arguments: readonly Argument[];
  readonly options: readonly Option[];
  /** Lines to copy, each with what it answers. */
  readonly examples: readonly (readonly [line: string, answer: string])[];
  /** Loads what it needs, answers, and returns the exit status. */
  run(input: Input, terminal: Terminal): Promise<number>;
}

/** The cycle file that most commands work on. */
export const fileArgument: Argument = { name: "FILE", help: "a cycle file" };

/** Values put in place of those in the file; every command that takes a file has it. */
export const setOption: Option = {
  flag: "--set",
  value: "NAME.key=VALUE",
  help: "put a value in place of the file's, as in T1.efficiency=55% or let.p_high='9 bar'",
  repeatable: true,
};

/** The text given to an option, or undefined. */
export function optionText({ options }: Input, name: string): string | undefined {
  const value = options[name];
  return typeof value === "string" ? value : undefined;
}

/** The texts given to a repeatable option. */
export function optionTexts({ options }: Input, name: string): readonly string[] {
  const value = options[name];
  return Array.isArray(value) ? (value as readonly string[]) : [];
}

/** The settings given with --set. */
export async function settingsOf(input: Input): Promise<readonly Override[]> {
  const texts = optionTexts(input, "set");
  if (texts.length === 0) return [];
  const { parseSetting } = await import("../cyclefile/load.js");
  return texts.map(parseSetting);
}
