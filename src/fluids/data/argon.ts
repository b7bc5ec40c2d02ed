import type { FluidData } from "../fluid-data.js";

export const argon: FluidData = {
  name: "argon",
  source:
    "C. Tegeler, R. Span, W. Wagner, J. Phys. Chem. Ref. Data 28 (1999) 779-850",
  molarMass: 0.039948, // kg/mol
  gasConstant: 8.31451, // J/(mol K)
  reducingTemperature: 150.687, // K
  reducingDensity: 13407.42965855612, // mol/m3
  range: {
    minimumTemperature: 83.806, // K
    belowMinimum: "where it freezes",
    maximumTemperature: 2000, // K
    maximumPressure: 100e6, // Pa; the equation itself goes to 1000 MPa
    melting: {
      kind: "powers",
      source: "Tegeler et al. 1999, as the equation of state",
      referenceTemperature: 83.8058, // K
      referencePressure: 68891, // Pa
      // n, t
      terms: [
        [-7476.26651, 1.05],
        [9959.06125, 1.275],
      ],
    },
  },
  ideal: {
    constant: 8.31666243,
    linear: -4.94651164,
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
      [0.088722304990011, 0, 1, 0],
      [0.70514805167298, 0.25, 1, 0],
      [-1.682011565409, 1, 1, 0],
      [-0.14909014431486, 2.75, 1, 0],
      [-0.1202480460094, 4, 1, 0],
      [-0.12164978798599, 0, 2, 0],
      [0.40035933626752, 0.25, 2, 0],
      [-0.27136062699129, 0.75, 2, 0],
      [0.24211924579645, 2.75, 2, 0],
      [0.005788958318557, 0, 3, 0],
      [-0.041097335615341, 2, 3, 0],
      [0.024710761541614, 0.75, 4, 0],
      [-0.32181391750702, 3, 1, 1],
      [0.33230017695794, 3.5, 1, 1],
      [0.031019986287345, 1, 3, 1],
      [-0.030777086002437, 2, 4, 1],
      [0.093891137419581, 4, 4, 1],
      [-0.090643210682031, 3, 5, 1],
      [-0.00045778349276654, 0, 7, 1],
      [-8.2659729025197e-05, 0.5, 10, 1],
      [0.00013013415603147, 1, 10, 1],
      [-0.011397840001996, 1, 2, 2],
      [-0.024455169960535, 7, 2, 2],
      [-0.064324067175955, 5, 4, 2],
      [0.058889471093674, 6, 4, 2],
      [-0.00064933552112965, 6, 8, 2],
      [-0.013889862158435, 10, 3, 3],
      [0.4048983929691, 13, 5, 3],
      [-0.38612519594749, 14, 5, 3],
      [-0.18817142332233, 11, 6, 3],
      [0.15977647596482, 14, 6, 3],
      [0.053985518513856, 8, 7, 3],
      [-0.028953417958014, 14, 7, 3],
      [-0.013025413381384, 6, 8, 3],
      [0.0028948696775778, 7, 9, 3],
      [-0.0022647134304796, 24, 5, 4],
      [0.0017616456196368, 22, 6, 4],
    ],
    // n, t, d, eta, beta, gamma, epsilon
    gaussians: [
      [0.0058552454482774, 3, 2, 20, 250, 1.11, 1],
      [-0.69251908270028, 1, 1, 20, 375, 1.14, 1],
      [1.5315490030516, 0, 2, 20, 300, 1.17, 1],
      [-0.0027380447449783, 0, 3, 20, 225, 1.11, 1],
    ],
  },
  phases: {
    kind: "vapour-pressure",
    // Where dp/drho and d2p/drho2 of this equation vanish together, from the equation.
    criticalTemperature: 150.687, // K
    criticalPressure: 4863000.5449, // Pa
    criticalDensity: 13407.42969, // mol/m3
    // Own fits to states of this equation; starting values only. Pressure: n, k.
    pressureGuess: [
      [-5.9195666, 1],
      [1.1368765, 1.5],
      [0.29869383, 2],
      [-0.96871448, 2.5],
      [0.12478732, 3],
      [0.36317853, 4],
      [-1.9172141, 5],
    ],
    guessTolerance: 3e-05,
    guess: {
      acentricFactor: -0.0022,
      liquidDensity: [1, 1.3288, 2.542, -6.0049, 8.6673, -4.344],
      vapourCompressibility: [0.28574, 0.46486, 0.89768, -1.0562, 2.7833, -2.5611],
    },
  },
  transport: {
    kind: "lemmon-jacobsen",
    source: "E. W. Lemmon, R. T Jacobsen, Int. J. Thermophys. 25 (2004) 21-69",
    reducingTemperature: 150.687, // K
    reducingDensity: 13407.43, // mol/m3
    reducingPressure: 4863000, // Pa
    collisionDiameter: 0.335, // nm
    collisionTemperature: 143.2, // K
    // N, t, d, l
    viscosity: [
      [1.219e-05, 0.42, 1, 0],
      [1.399e-05, 0, 2, 0],
      [5.027e-09, 0.95, 10, 0],
      [-1.893e-05, 0.5, 5, 2],
      [-6.698e-06, 0.9, 1, 4],
      [-3.827e-06, 0.8, 2, 4],
    ],
    diluteConductivity: { perViscosity: 0.0008158, terms: [[-0.000432, -0.77]] },
    conductivity: [
      [0.01373, 0, 1, 0],
      [0.01007, 0, 2, 0],
      [0.0007375, 0, 4, 0],
      [-0.03396, 0.8, 5, 2],
      [0.02047, 1.2, 6, 2],
      [-0.002274, 0.8, 9, 2],
      [-0.003973, 0.5, 1, 4],
    ],
    enhancement: {
      cutoff: 0.32, // nm
      amplitude: 0.13, // nm
      referenceTemperature: 301.374, // K
    },
  },
};
