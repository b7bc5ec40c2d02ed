import { boiloff } from "./boiloff.js";
import { breakeven } from "./breakeven.js";
import { check } from "./check.js";
import type { Command } from "./command.js";
import { points } from "./points.js";
import { run } from "./run.js";
import { state } from "./state.js";
import { sweep } from "./sweep.js";

/** Every command, in the order in which help lists them. */
export const commands: readonly Command[] = [run, points, sweep, breakeven, state, boiloff, check];
