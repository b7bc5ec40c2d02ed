import type { FluidData } from "../fluid-data.js";

export const neon: FluidData = {
  name: "neon",
  source:
    "M. Thol, R. Beckmueller, R. Weiss, A. H. Harvey, E. W. Lemmon, R. T Jacobsen, R. Span, equation of state for neon, 2019",
  molarMass: 0.020179, // kg/mol
  gasConstant: 8.3144598, // J/(mol K)
  reducingTemperature: 44.4, // K
  reducingDensity: 24100, // mol/m3
  range: {
    minimumTemperature: 24.5561, // K
    belowMinimum: "where it freezes",
    maximumTemperature: 725, // K
    maximumPressure: 100e6, // Pa; the equation itself goes to 1000 MPa
    // p / (kg/cm2) = -1057.99 + 6.289415 (T/K)^1.599916
    melting: {
      kind: "powers",
      source: "R. L. Mills, E. R. Grilly, Phys. Rev. 99 (1955) 480-486",
      referenceTemperature: 1, // K
      referencePressure: 98066.5 * (6.289415 - 1057.99), // Pa
      terms: [[6.289415 / (6.289415 - 1057.99), 1.599916]], // n, t
    },
  },
  ideal: {
    constant: -3.0384719151147275,
    linear: 3.253690479855404,
    logarithm: 1.5,
    // n, t
    powers: [],
    // n, theta
    einstein: [],
    // n, theta, c, d
    offsetEinstein: [],
  },
  residual: {
    // n, t, d, l
    powers: [
      [0.031522418, 1, 4, 0],
      [3.7716418, 0.431, 1, 0],
      [-4.27399448, 0.592, 1, 0],
      [-0.756466758, 1.105, 2, 0],
      [0.066679921, 0.49, 3, 0],
      [-0.356928434, 2.3, 1, 2],
      [-0.053124761, 3.18, 3, 2],
      [0.9407234, 1.36, 2, 1],
      [-0.969302374, 2, 2, 2],
      [0.461243234, 0.5, 4, 1],
      [0.008184422, 1.12, 7, 1],
    ],
    // n, t, d, eta, beta, gamma, epsilon
    gaussians: [
      [7.84771604, 0.41, 1, 0.76, 0.537, 1.997, 0.5775],
      [6.39604094, 0.64, 1, 2.126, 0.765, 1.782, 0.9137],
      [-1.27480579, 0.579, 3, 2.168, 0.883, 1.663, 0.7895],
      [-5.51887999, 0.6, 2, 2.033, 0.751, 1.837, 0.6229],
      [-8.76652276, 0.52, 1, 0.743, 0.531, 1.953, 0.4992],
      [-0.351732709, 0.655, 2, 4.38, 11.4, 1.658, 0.869],
    ],
  },
  phases: {
    kind: "vapour-pressure",
    // Where dp/drho and d2p/drho2 of this equation vanish together, from the equation.
    criticalTemperature: 44.39999970499, // K
    criticalPressure: 2661630.7063, // Pa
    criticalDensity: 24099.9901, // mol/m3
    // Own fits to states of this equation; starting values only. Pressure: n, k.
    pressureGuess: [
      [-5.8442248, 1],
      [1.9034916, 1.5],
      [-3.7720466, 2],
      [8.6338401, 2.5],
      [-8.4489842, 3],
      [4.2871878, 4],
      [-2.8117119, 5],
    ],
    guessTolerance: 5e-05,
    guess: {
      acentricFactor: -0.0387,
      liquidDensity: [1, 0.70261, 6.8672, -18.383, 24.41, -11.934],
      vapourCompressibility: [0.29568, 0.25995, 2.269, -5.1988, 8.2624, -5.1696],
    },
  },
};
