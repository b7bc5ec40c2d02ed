import type { FluidData } from "../fluid-data.js";

export const nitrogen: FluidData = {
  name: "nitrogen",
  source:
    "R. Span, E. W. Lemmon, R. T Jacobsen, W. Wagner, A. Yokozeki, J. Phys. Chem. Ref. Data 29 (2000) 1361-1433",
  molarMass: 0.02801348, // kg/mol
  gasConstant: 8.31451, // J/(mol K)
  reducingTemperature: 126.192, // K
  reducingDensity: 11183.901464580624, // mol/m3
  range: {
    minimumTemperature: 63.151, // K
    belowMinimum: "where it freezes",
    maximumTemperature: 2000, // K
    maximumPressure: 100e6, // Pa; the equation itself goes to 2200 MPa
    melting: {
      kind: "powers",
      source: "Span et al. 2000, as the equation of state",
      referenceTemperature: 63.151, // K
      referencePressure: 12523, // Pa
      terms: [[12798.61, 1.78963]], // n, t
    },
  },
  ideal: {
    constant: -12.76952708,
    linear: -0.00784163,
    logarithm: 2.5,
    // n, t
    powers: [
      [-0.0001934819, -1],
      [-1.247742e-05, -2],
      [6.678326e-08, -3],
    ],
    // n, theta
    einstein: [
      [1.012941, 26.657878470901483],
    ],
    // n, theta, c, d
    offsetEinstein: [],
  },
  residual: {
    // n, t, d, l
    powers: [
      [0.924803575275, 0.25, 1, 0],
      [-0.492448489428, 0.875, 1, 0],
      [0.661883336938, 0.5, 2, 0],
      [-1.92902649201, 0.875, 2, 0],
      [-0.0622469309629, 0.375, 3, 0],
      [0.349943957581, 0.75, 3, 0],
      [0.564857472498, 0.5, 1, 1],
      [-1.61720005987, 0.75, 1, 1],
      [-0.481395031883, 2, 1, 1],
      [0.421150636384, 1.25, 3, 1],
      [-0.0161962230825, 3.5, 3, 1],
      [0.172100994165, 1, 4, 1],
      [0.00735448924933, 0.5, 6, 1],
      [0.0168077305479, 3, 6, 1],
      [-0.00107626664179, 0, 7, 1],
      [-0.0137318088513, 2.75, 7, 1],
      [0.000635466899859, 0.75, 8, 1],
      [0.00304432279419, 2.5, 8, 1],
      [-0.0435762336045, 4, 1, 2],
      [-0.0723174889316, 6, 2, 2],
      [0.0389644315272, 6, 3, 2],
      [-0.021220136391, 3, 4, 2],
      [0.00408822981509, 3, 5, 2],
      [-5.51990017984e-05, 6, 8, 2],
      [-0.0462016716479, 16, 4, 3],
      [-0.00300311716011, 11, 5, 3],
      [0.0368825891208, 15, 5, 3],
      [-0.0025585684622, 12, 8, 3],
      [0.00896915264558, 12, 3, 4],
      [-0.0044151337035, 7, 5, 4],
      [0.00133722924858, 4, 6, 4],
      [0.000264832491957, 16, 9, 4],
    ],
    // n, t, d, eta, beta, gamma, epsilon
    gaussians: [
      [19.6688194015, 0, 1, 20, 325, 1.16, 1],
      [-20.911560073, 1, 1, 20, 325, 1.16, 1],
      [0.0167788306989, 2, 3, 15, 300, 1.13, 1],
      [2627.67566274, 3, 2, 25, 275, 1.25, 1],
    ],
  },
  phases: {
    kind: "vapour-pressure",
    // Where dp/drho and d2p/drho2 of this equation vanish together, from the equation.
    criticalTemperature: 126.1919999996, // K
    criticalPressure: 3395800.4446, // Pa
    criticalDensity: 11183.90149, // mol/m3
    // Own fits to states of this equation; starting values only. Pressure: n, k.
    pressureGuess: [
      [-6.1176897, 1],
      [1.0985197, 1.5],
      [1.2085816, 2],
      [-4.4781717, 2.5],
      [4.5369978, 3],
      [-3.3684974, 4],
      [-0.10247992, 5],
    ],
    guessTolerance: 2e-05,
    guess: {
      acentricFactor: 0.0372,
      liquidDensity: [1, 1.4775, 1.3638, -1.8667, 2.5747, -1.1241],
      vapourCompressibility: [0.28698, 0.47672, 0.84892, -0.84204, 2.5562, -2.5481],
    },
  },
  transport: {
    kind: "lemmon-jacobsen",
    source: "E. W. Lemmon, R. T Jacobsen, Int. J. Thermophys. 25 (2004) 21-69",
    reducingTemperature: 126.192, // K
    reducingDensity: 11183.9, // mol/m3
    reducingPressure: 3395800, // Pa
    collisionDiameter: 0.3656, // nm
    collisionTemperature: 98.94, // K
    // N, t, d, l
    viscosity: [
      [1.072e-05, 0.1, 2, 0],
      [3.989e-08, 0.25, 10, 1],
      [1.208e-09, 3.2, 12, 1],
      [-7.402e-06, 0.9, 2, 2],
      [4.62e-06, 0.3, 1, 3],
    ],
    diluteConductivity: { perViscosity: 0.001511, terms: [[0.002117, -1], [-0.003332, -0.7]] },
    conductivity: [
      [0.008862, 0, 1, 0],
      [0.03111, 0.03, 2, 0],
      [-0.07313, 0.2, 3, 1],
      [0.02003, 0.8, 4, 2],
      [-0.0007096, 0.6, 8, 2],
      [0.0002672, 1.9, 10, 2],
    ],
    enhancement: {
      cutoff: 0.4, // nm
      amplitude: 0.17, // nm
      referenceTemperature: 252.384, // K
    },
  },
};
