import type { TransportData } from "./transport-data.js";

/** Coefficients of one fluid, as published: molar, on the paper's own reducing point and gas constant. */
export interface FluidData {
  readonly name: string;
  /** Where the equation of state is published. */
  readonly source: string;
  /** kg/mol */
  readonly molarMass: number;
  /** J/(mol K), the value the equation was fitted with */
  readonly gasConstant: number;
  /** K; tau = reducingTemperature / T */
  readonly reducingTemperature: number;
  /** mol/m3; delta = density / reducingDensity */
  readonly reducingDensity: number;
  readonly range: ValidRange;
  readonly ideal: IdealTerms;
  readonly residual: ResidualTerms;
  readonly phases: BubbleAndDewCurves | VapourPressureCurve;
  /** Missing where no published correlation is at hand. */
  readonly transport?: TransportData;
}

/** Where the equation may be used here. */
export interface ValidRange {
  /** K */
  readonly minimumTemperature: number;
  /** What happens below the lowest temperature, as a clause. */
  readonly belowMinimum: string;
  /** K */
  readonly maximumTemperature: number;
  /** Pa */
  readonly maximumPressure: number;
  /** Where liquid freezes under pressure; missing where no curve is published. */
  readonly melting?: MeltingCurve;
}

/**
 * Melting pressure: p / p_0 = 1 + sum n ((T / T_0)^t - 1), or ln(p / p_0) = sum n (T / T_0 - 1)^t.
 * It limits the range and enters no property.
 */
export interface MeltingCurve {
  readonly kind: "powers" | "logarithm";
  readonly source: string;
  /** K */
  readonly referenceTemperature: number;
  /** Pa */
  readonly referencePressure: number;
  readonly terms: readonly (readonly [n: number, t: number])[];
}

/**
 * Ideal-gas part: alpha0 = ln(delta) + constant + linear tau + logarithm ln(tau) + sum n tau^t
 * + sum n ln(1 - exp(-theta tau)) + sum n ln(c + d exp(theta tau)).
 */
export interface IdealTerms {
  readonly constant: number;
  readonly linear: number;
  readonly logarithm: number;
  readonly powers: readonly (readonly [n: number, t: number])[];
  readonly einstein: readonly (readonly [n: number, theta: number])[];
  readonly offsetEinstein: readonly (readonly [n: number, theta: number, c: number, d: number])[];
}

/**
 * Residual part: alphar = sum n delta^d tau^t exp(-delta^l), the exponential only where l > 0,
 * + sum n delta^d tau^t exp(-eta (delta - epsilon)^2 - beta (tau - gamma)^2).
 */
export interface ResidualTerms {
  readonly powers: readonly PowerTerm[];
  readonly gaussians: readonly GaussianTerm[];
}

export type PowerTerm = readonly [n: number, t: number, d: number, l: number];
export type GaussianTerm = readonly [n: number, t: number, d: number, eta: number, beta: number, gamma: number, epsilon: number];

/** Terms n (1 - T / T_end)^k of an auxiliary curve along the phase boundary. */
export type CurveTerms = readonly (readonly [n: number, k: number])[];

/** A mixture treated as one fluid: two pressure curves that are part of the published formulation and meet in one point. */
export interface BubbleAndDewCurves {
  readonly kind: "bubble-and-dew";
  /** K, where both curves end */
  readonly endTemperature: number;
  /** Pa */
  readonly endPressure: number;
  /** mol/m3 */
  readonly endDensity: number;
  /** ln(p / endPressure) = (endTemperature / T) sum n (1 - T / endTemperature)^k */
  readonly bubblePressure: CurveTerms;
  /** The same form. */
  readonly dewPressure: CurveTerms;
  readonly guess: SaturationGuess;
}

/** A pure fluid: the boundary follows from equal pressure and equal chemical potential; the curves here only start that search. */
export interface VapourPressureCurve {
  readonly kind: "vapour-pressure";
  /** K, where dp/drho and d2p/drho2 of this equation vanish together */
  readonly criticalTemperature: number;
  /** Pa */
  readonly criticalPressure: number;
  /** mol/m3 */
  readonly criticalDensity: number;
  /** ln(p / criticalPressure) = (criticalTemperature / T) sum n (1 - T / criticalTemperature)^k; good to `guessTolerance`. */
  readonly pressureGuess: CurveTerms;
  /** Largest relative error of `pressureGuess`, rounded up. */
  readonly guessTolerance: number;
  readonly guess: SaturationGuess;
}

/** Starting values for the saturated densities: polynomials in x = (1 - T / T_end)^(1/3), lowest power first. */
export interface SaturationGuess {
  /** Pitzer's acentric factor, for the starting value of dense gas. */
  readonly acentricFactor: number;
  /** Liquid density over the end's density. */
  readonly liquidDensity: readonly number[];
  /** Compressibility factor p / (density R T) of saturated vapour. */
  readonly vapourCompressibility: readonly number[];
}

/** Where the two-phase region ends: K, Pa, and kg/m3. */
export function criticalPoint(data: FluidData): { temperature: number; pressure: number; density: number } {
  const { phases, molarMass } = data;
  return phases.kind === "bubble-and-dew"
    ? { temperature: phases.endTemperature, pressure: phases.endPressure, density: phases.endDensity * molarMass }
    : { temperature: phases.criticalTemperature, pressure: phases.criticalPressure, density: phases.criticalDensity * molarMass };
}
