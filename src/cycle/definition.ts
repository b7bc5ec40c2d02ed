import type { BlockDefinition } from "../blocks/definition.js";

/** The air around the machine: the state of an open circuit's intake and the sink of the heat it rejects. */
export interface Surroundings {
  /** K */
  readonly temperature: number;
  /** Pa */
  readonly pressure: number;
  /** 0 to 1 */
  readonly relativeHumidity: number;
  /** mol/mol of dry air; left out, 420e-6 */
  readonly carbonDioxide?: number;
}

/** The flow at the compressor's inlet. A volume there becomes a mass only once the inlet state is known. */
export type Flow =
  | { readonly kind: "mass"; /** kg/s */ readonly value: number }
  | { readonly kind: "molar"; /** mol/s */ readonly value: number }
  /** A volume flow at a stated reference state: normal (0 degC, 101.325 kPa) or standard (60 degF, 14.696 psi). */
  | { readonly kind: "reference volume"; /** m3/s */ readonly value: number; /** K */ readonly temperature: number; /** Pa */ readonly pressure: number }
  /** A volume flow at the compressor's own inlet conditions (free air delivery, ISO 1217). */
  | { readonly kind: "inlet volume"; /** m3/s */ readonly value: number };

/** A cycle file, read and checked: SI units, defaults filled in. */
export interface CycleDefinition {
  readonly title: string;
  readonly fluid: string;
  readonly surroundings: Surroundings;
  readonly circuit: "closed" | "open";
  readonly flow: Flow;
  /** The blocks in the order in which the gas meets them. */
  readonly loop: readonly BlockDefinition[];
  readonly branches: Readonly<Record<string, readonly BlockDefinition[]>>;
}
