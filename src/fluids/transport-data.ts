/** Terms N tau^t delta^d exp(-delta^l), the exponential only where l > 0. */
export type TransportTerm = readonly [n: number, t: number, d: number, l: number];

/** Form of E. W. Lemmon and R. T Jacobsen, Int. J. Thermophys. 25 (2004) 21-69; tau = T_r / T, delta = density / reducingDensity. */
export interface LemmonJacobsenData {
  readonly kind: "lemmon-jacobsen";
  readonly source: string;
  /** K */
  readonly reducingTemperature: number;
  /** mol/m3 */
  readonly reducingDensity: number;
  /** Pa, critical pressure */
  readonly reducingPressure: number;
  /** Lennard-Jones collision diameter, nm */
  readonly collisionDiameter: number;
  /** Lennard-Jones energy over Boltzmann's constant, K */
  readonly collisionTemperature: number;
  /** Pa s */
  readonly viscosity: readonly TransportTerm[];
  /** W/(m K) per uPa s of dilute viscosity; then N tau^t in W/(m K) */
  readonly diluteConductivity: { readonly perViscosity: number; readonly terms: readonly (readonly [n: number, t: number])[] };
  /** W/(m K) */
  readonly conductivity: readonly TransportTerm[];
  readonly enhancement: {
    /** Inverse of the cutoff wave number q_D, nm */
    readonly cutoff: number;
    /** Amplitude xi_0 of the correlation length, nm */
    readonly amplitude: number;
    /** K, above which there is no enhancement */
    readonly referenceTemperature: number;
  };
}

/** Helium: viscosity after Arp, McCarty and Friend, thermal conductivity after Hands and Arp. */
export interface HeliumTransportData {
  readonly kind: "helium";
  readonly source: string;
  /** Powers -1 to 3 of x = ln(T/K), T at most 300 K: ln of viscosity in ug/(cm s) of dilute gas below 100 K */
  readonly diluteViscosity: readonly number[];
  /** The same powers: coefficients of rho, rho^2, rho^3 (g/cm3) in the logarithm of viscosity */
  readonly denseViscosity: readonly (readonly number[])[];
  /** n T^t exp(a/T + b/T^2 + c), ug/(cm s): dilute viscosity above 100 K */
  readonly hotViscosity: { readonly n: number; readonly t: number; readonly exponents: readonly number[] };
  /** n T^t exp(a/T + b/T^2...), W/(m K): dilute conductivity */
  readonly diluteConductivity: { readonly n: number; readonly t: number; readonly exponents: readonly number[] };
  /** Per power of density (kg/m3): coefficients of T^0, T^(1/3), T^(2/3), T, 1/T in W/(m K) */
  readonly conductivity: { readonly linear: readonly number[]; readonly cubic: readonly number[]; readonly logarithmic: readonly number[] };
  /** kg/m3 in the logarithmic term */
  readonly logarithmDensity: number;
  /** K, below which the critical enhancement, which is not given here, counts */
  readonly lowestConductivityTemperature: number;
}

export type TransportData = LemmonJacobsenData | HeliumTransportData;
