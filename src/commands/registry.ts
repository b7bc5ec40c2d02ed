import { check } from "./check.js";
import type { Command } from "./command.js";
import { points } from "./points.js";
import { run } from "./run.js";
import { state } from "./state.js";

/** Every command, in the order in which help lists them. */
export const commands: readonly Command[] = [run, points, state, check];
