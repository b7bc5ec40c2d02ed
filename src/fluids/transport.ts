import { NoCorrelationError } from "./errors.js";
import type { FluidData } from "./fluid-data.js";
import { HeliumTransport } from "./helium-transport.js";
import type { HelmholtzEquation } from "./helmholtz.js";
import { LemmonJacobsenTransport } from "./lemmon-jacobsen.js";
import type { State } from "./state.js";
import type { TransportModel } from "./transport-model.js";

/** Viscosity and thermal conductivity of a fluid, or the reason why there is none. */
export class Transport {
  private readonly model: TransportModel | null;

  constructor(
    private readonly data: FluidData,
    equation: HelmholtzEquation,
  ) {
    const { transport } = data;
    if (transport === undefined) this.model = null;
    else this.model = transport.kind === "helium" ? new HeliumTransport(transport) : new LemmonJacobsenTransport(transport, data.molarMass, equation);
  }

  /**
   * Viscosity, Pa s.
   *
   * @throws NoCorrelationError between bubble and dew, and where no correlation is at hand
   */
  viscosity(state: State): number {
    return this.modelFor(state, "viscosity").viscosity(state);
  }

  /**
   * Thermal conductivity, W/(m K).
   *
   * @throws NoCorrelationError between bubble and dew, and where no correlation is at hand
   */
  thermalConductivity(state: State): number {
    const model = this.modelFor(state, "thermal conductivity");
    const reason = model.conductivityReason(state);
    if (reason !== null) throw new NoCorrelationError(this.data.name, "thermal conductivity", reason);
    return model.thermalConductivity(state);
  }

  private modelFor(state: State, quantity: string): TransportModel {
    if (state.phase === "two-phase") throw new NoCorrelationError(this.data.name, quantity, "liquid and vapour each have their own");
    if (this.model === null) throw new NoCorrelationError(this.data.name, quantity, "no published correlation is at hand");
    return this.model;
  }
}
