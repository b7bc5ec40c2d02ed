import { NoSteadyState } from "./failure.js";
import type { Network } from "./network.js";

/** J/kg that stand for the whole of the machine's flow, and for a pressure ratio's factor of e, so that all unknowns are of one size. */
const FLOW_SCALE = 1e5;
const RATIO_SCALE = 1e5;

/**
 * One pass through the machine: assumed values in, what the blocks make of them out. A steady state is a point that a
 * pass returns unchanged. The unknowns are, in this order and all in J/kg: the tears' enthalpies; the flows of those tears
 * whose flow depends on the state of the gas; the logarithms of the floating pressure ratios.
 */
export class Pass {
  /** Passes made so far. */
  count = 0;
  readonly size: number;
  /** The block being evaluated, for the message when it cannot be. */
  private at = "";
  private readonly torn: Network["tears"][number]["stream"][];
  private readonly tornFlows: Network["tears"][number]["stream"][];
  private readonly ratios: number[];

  constructor(private readonly network: Network) {
    this.torn = network.tears.map(({ stream }) => stream);
    this.tornFlows = network.tears.flatMap(({ stream, flow }) => (flow ? [stream] : []));
    this.ratios = network.floating.map(() => NaN);
    this.size = this.torn.length + this.tornFlows.length + this.ratios.length;
  }

  /** How many of the unknowns are enthalpies: they come first. */
  get enthalpies(): number {
    return this.torn.length;
  }

  /** The unknowns that stand for given enthalpies, no liquid anywhere, and pressure ratios (see `Network.floating`). */
  start(enthalpies: Float64Array, ratio: number): Float64Array {
    const x = new Float64Array(this.size);
    x.set(enthalpies);
    x.fill(FLOW_SCALE, this.torn.length, this.torn.length + this.tornFlows.length);
    x.fill(Math.log(ratio) * RATIO_SCALE, this.torn.length + this.tornFlows.length);
    return x;
  }

  /**
   * Evaluates every block once.
   * @param assumed the unknowns, J/kg
   * @param change J/kg, set to what came back less what was assumed
   * @throws OutOfRangeError from a block that leaves the equation's range; `failedAt` then names it
   */
  run(assumed: Float64Array, change: Float64Array): void {
    const { torn, tornFlows, ratios, network } = this;
    const { order, floating, inlet } = network;
    const flowsFrom = torn.length;
    const ratiosFrom = flowsFrom + tornFlows.length;
    this.count++;
    this.at = "";
    for (let i = 0; i < ratios.length; i++) ratios[i] = Math.exp(assumed[ratiosFrom + i] / RATIO_SCALE);
    network.setPressures(ratios);
    for (let i = 0; i < torn.length; i++) torn[i].enthalpy = assumed[i];
    network.setFlows();
    const whole = inlet.massFlow;
    for (let i = 0; i < tornFlows.length; i++) tornFlows[i].massFlow = Math.max(0, (assumed[flowsFrom + i] / FLOW_SCALE) * whole);
    for (const { unit, kind, ports } of order) {
      this.at = unit.name;
      if (kind.joint === undefined) for (const { inlet: from, outlet } of ports) outlet.massFlow = from.massFlow;
      unit.evaluate();
    }
    for (let i = 0; i < torn.length; i++) change[i] = torn[i].enthalpy - assumed[i];
    for (let i = 0; i < tornFlows.length; i++) change[flowsFrom + i] = (tornFlows[i].massFlow / whole) * FLOW_SCALE - assumed[flowsFrom + i];
    for (let i = 0; i < ratios.length; i++) {
      const { name, placed } = floating[i];
      change[ratiosFrom + i] = (network.setting.shaftPowerInto(name) - placed.unit.energyFlows().work) / whole;
    }
    for (const value of change) {
      if (!Number.isFinite(value)) throw new NoSteadyState(this.at, "balance", "its balance gave no number.", "Please report this cycle file.");
    }
  }

  /** What an unknown belongs to: the block behind which its stream stands, or the block whose pressure floats. */
  nameOf(unknown: number): string {
    const { torn, tornFlows, network } = this;
    const stream = torn[unknown] ?? tornFlows[unknown - torn.length];
    if (stream === undefined) return network.floating[unknown - torn.length - tornFlows.length].name;
    return network.labelled.find((each) => each.stream === stream)?.after ?? "the intake";
  }

  get fluid(): Network["setting"]["fluid"] {
    return this.network.setting.fluid;
  }

  get failedAt(): string | null {
    return this.at === "" ? null : this.at;
  }
}
