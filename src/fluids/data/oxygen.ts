import type { FluidData } from "../fluid-data.js";

export const oxygen: FluidData = {
  name: "oxygen",
  source:
    "R. Schmidt, W. Wagner, Fluid Phase Equilib. 19 (1985) 175-200; ideal-gas part R. B. Stewart, R. T Jacobsen, W. Wagner, J. Phys. Chem. Ref. Data 20 (1991) 917-1021",
  molarMass: 0.0319988, // kg/mol
  gasConstant: 8.31434, // J/(mol K)
  reducingTemperature: 154.581, // K
  reducingDensity: 13630, // mol/m3
  range: {
    minimumTemperature: 54.361, // K
    belowMinimum: "where it freezes",
    maximumTemperature: 2000, // K
    maximumPressure: 80e6, // Pa
    melting: {
      kind: "logarithm",
      source: "Schmidt and Wagner 1985, as the equation of state",
      referenceTemperature: 54.361, // K
      referencePressure: 146.33, // Pa
      // n, t
      terms: [
        [-32.463539, 0.0625],
        [142.78011, 0.125],
        [-147.02341, 0.1875],
        [52.0012, 0.25],
      ],
    },
  },
  ideal: {
    constant: 0,
    linear: 0,
    logarithm: 2.51808732,
    // n, t
    powers: [],
    // n, theta
    einstein: [
      [1.02323928, 14.5316979447668],
      [0.784357918, 72.8419165356674],
      [0.00337183363, 7.7710849975094],
      [-0.0170864084, 0.446425786480874],
      [0.0463751562, 34.4677188658373],
    ],
    // n, theta, c, d
    offsetEinstein: [],
  },
  residual: {
    // n, t, d, l
    powers: [
      [0.3983768749, 0, 1, 0],
      [-1.846157454, 1.5, 1, 0],
      [0.4183473197, 2.5, 1, 0],
      [0.02370620711, -0.5, 2, 0],
      [0.09771730573, 1.5, 2, 0],
      [0.03017891294, 2, 2, 0],
      [0.02273353212, 0, 3, 0],
      [0.01357254086, 1, 3, 0],
      [-0.04052698943, 2.5, 3, 0],
      [0.0005454628515, 0, 6, 0],
      [0.0005113182277, 2, 7, 0],
      [2.953466883e-07, 5, 7, 0],
      [-8.687645072e-05, 2, 8, 0],
      [-0.2127082589, 5, 1, 2],
      [0.08735941958, 6, 1, 2],
      [0.127550919, 3.5, 2, 2],
      [-0.09067701064, 5.5, 2, 2],
      [-0.03540084206, 3, 3, 2],
      [-0.03623278059, 7, 3, 2],
      [0.0132769929, 6, 5, 2],
      [-0.0003254111865, 8.5, 6, 2],
      [-0.008313582932, 4, 7, 2],
      [0.002124570559, 6.5, 8, 2],
      [-0.0008325206232, 5.5, 10, 2],
      [-2.626173276e-05, 22, 2, 4],
      [0.002599581482, 11, 3, 4],
      [0.009984649663, 18, 3, 4],
      [0.002199923153, 11, 4, 4],
      [-0.02591350486, 23, 4, 4],
      [-0.1259630848, 17, 5, 4],
      [0.1478355637, 18, 5, 4],
      [-0.01011251078, 23, 5, 4],
    ],
    // n, t, d, eta, beta, gamma, epsilon
    gaussians: [],
  },
  phases: {
    kind: "vapour-pressure",
    // Where dp/drho and d2p/drho2 of this equation vanish together, from the equation.
    criticalTemperature: 154.5993898353, // K
    criticalPressure: 5046410.5212, // Pa
    criticalDensity: 13342.18938, // mol/m3
    // Own fits to states of this equation; starting values only. Pressure: n, k.
    pressureGuess: [
      [-5.9970365, 1],
      [0.37504166, 1.5],
      [4.8223592, 2],
      [-12.820291, 2.5],
      [12.788804, 3],
      [-7.5299867, 4],
      [1.5339532, 5],
    ],
    guessTolerance: 0.0007,
    guess: {
      acentricFactor: 0.0222,
      liquidDensity: [1, 1.3253, 4.0023, -10.756, 14.211, -6.386],
      vapourCompressibility: [0.28909, 0.4012, 1.1578, -1.3448, 2.8108, -2.5015],
    },
  },
  transport: {
    kind: "lemmon-jacobsen",
    source: "E. W. Lemmon, R. T Jacobsen, Int. J. Thermophys. 25 (2004) 21-69",
    reducingTemperature: 154.581, // K
    reducingDensity: 13630, // mol/m3
    reducingPressure: 5043000, // Pa
    collisionDiameter: 0.3428, // nm
    collisionTemperature: 118.5, // K
    // N, t, d, l
    viscosity: [
      [1.767e-05, 0.05, 1, 0],
      [4.042e-07, 0, 5, 0],
      [1.077e-10, 2.1, 12, 0],
      [3.51e-07, 0, 8, 1],
      [-1.367e-05, 0.5, 1, 2],
    ],
    diluteConductivity: { perViscosity: 0.001036, terms: [[0.006283, -0.9], [-0.004262, -0.6]] },
    conductivity: [
      [0.01531, 0, 1, 0],
      [0.008898, 0, 3, 0],
      [-0.0007336, 0.3, 4, 0],
      [0.006728, 4.3, 5, 2],
      [-0.004374, 0.5, 7, 2],
      [-0.0004747, 1.8, 10, 2],
    ],
    enhancement: {
      cutoff: 0.51, // nm
      amplitude: 0.24, // nm
      referenceTemperature: 309.162, // K
    },
  },
};
