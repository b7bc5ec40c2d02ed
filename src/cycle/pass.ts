import { NoSteadyState } from "./failure.js";
import type { Network } from "./network.js";

/**
 * One pass through the machine: assumed enthalpies in, what the blocks make of them out. A steady state is a point that a
 * pass returns unchanged.
 */
export class Pass {
  /** Passes made so far. */
  count = 0;
  /** The block being evaluated, for the message when it cannot be. */
  private at = "";

  constructor(private readonly network: Network) {}

  /**
   * Evaluates every block once.
   * @param assumed J/kg, one for each tear
   * @param change J/kg, set to what came back less what was assumed
   * @throws OutOfRangeError from a block that leaves the equation's range; `failedAt` then names it
   */
  run(assumed: Float64Array, change: Float64Array): void {
    const { tears, order, setFlows } = this.network;
    this.count++;
    for (let i = 0; i < tears.length; i++) (tears[i] as { enthalpy: number }).enthalpy = assumed[i] as number;
    this.at = "";
    setFlows();
    for (const { unit } of order) {
      this.at = unit.name;
      unit.evaluate();
    }
    for (let i = 0; i < tears.length; i++) {
      change[i] = (tears[i] as { enthalpy: number }).enthalpy - (assumed[i] as number);
      if (!Number.isFinite(change[i])) throw new NoSteadyState(this.at, "balance", "its balance gave no number.", "Please report this cycle file.");
    }
  }

  get fluid(): Network["setting"]["fluid"] {
    return this.network.setting.fluid;
  }

  get failedAt(): string | null {
    return this.at === "" ? null : this.at;
  }
}
