/** How two components of a mixture combine, in the reducing functions of the GERG-2008 form. */
export interface PairParameters {
  readonly components: readonly [string, string];
  readonly betaT: number;
  readonly gammaT: number;
  readonly betaV: number;
  readonly gammaV: number;
}

/**
 * Nitrogen, argon and oxygen as a mixture: the component equations at the mixture's reduced temperature and density, no
 * departure function for these pairs.
 *
 * Form: O. Kunz, W. Wagner, J. Chem. Eng. Data 57 (2012) 3032. Parameters: J. Gernert, R. Span, EOS-CG, J. Chem. Thermodyn. 93
 * (2016) 274.
 */
export const airPairs: readonly PairParameters[] = [
  { components: ["nitrogen", "oxygen"], betaT: 0.997190589, gammaT: 0.995157044, betaV: 0.99952177, gammaV: 0.997082328 },
  { components: ["nitrogen", "argon"], betaT: 0.999442, gammaT: 0.989311, betaV: 1.006697, gammaV: 1.001549 },
  { components: ["oxygen", "argon"], betaT: 0.999039, gammaT: 0.988822, betaV: 1.006502, gammaV: 1.001341 },
];

/** Mole fractions of dry air as the pseudo-pure equation takes it: 28.9586 g/mol (Lemmon et al. 2000). */
export const dryAir = { nitrogen: 0.7812, argon: 0.0092, oxygen: 0.2096 } as const;
