import type { FluidData } from "../fluid-data.js";

export const helium: FluidData = {
  name: "helium",
  source:
    "D. O. Ortiz Vega et al., equation of state for helium-4, J. Phys. Chem. Ref. Data",
  molarMass: 0.004002602, // kg/mol
  gasConstant: 8.3144598, // J/(mol K)
  reducingTemperature: 5.1953, // K
  reducingDensity: 17383.7, // mol/m3
  range: {
    minimumTemperature: 2.1768, // K
    belowMinimum: "where it turns superfluid",
    maximumTemperature: 2000, // K
    maximumPressure: 100e6, // Pa; the equation itself goes to 1000 MPa
    // p / (kg/cm2) = -17.80 + 17.31083 (T/K)^1.555414
    melting: {
      kind: "powers",
      source: "R. L. Mills, E. R. Grilly, Phys. Rev. 99 (1955) 480-486",
      referenceTemperature: 1, // K
      referencePressure: 98066.5 * (17.31083 - 17.8), // Pa
      terms: [[17.31083 / (17.31083 - 17.8), 1.555414]], // n, t
    },
  },
  ideal: {
    constant: 0.1871304489697973,
    linear: 0.4848903984696551,
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
      [0.015559018, 1, 4, 0],
      [3.0638932, 0.425, 1, 0],
      [-4.2420844, 0.63, 1, 0],
      [0.054418088, 0.69, 2, 0],
      [-0.18971904, 1.83, 2, 0],
      [0.087856262, 0.575, 3, 0],
      [2.2833566, 0.925, 1, 1],
      [-0.53331595, 1.585, 1, 2],
      [-0.53296502, 1.69, 3, 2],
      [0.99444915, 1.51, 2, 1],
      [-0.30078896, 2.9, 2, 2],
      [-1.6432563, 0.8, 1, 1],
    ],
    // n, t, d, eta, beta, gamma, epsilon
    gaussians: [
      [0.8029102, 1.26, 2, 1.5497, 0.2471, 3.15, 0.596],
      [0.026838669, 3.51, 1, 9.245, 0.0983, 2.54505, 0.3423],
      [0.04687678, 2.785, 2, 4.76323, 0.1556, 1.2513, 0.761],
      [-0.14832766, 1, 1, 6.3826, 2.6782, 1.9416, 0.9747],
      [0.03016211, 4.22, 1, 8.7023, 2.7077, 0.5984, 0.5868],
      [-0.019986041, 0.83, 3, 0.255, 0.6621, 2.2282, 0.5627],
      [0.14283514, 1.575, 2, 0.3523, 0.1775, 1.606, 2.5346],
      [0.007418269, 3.447, 2, 0.1492, 0.4821, 3.815, 3.6763],
      [-0.22989793, 0.73, 3, 0.05, 0.3069, 1.61958, 4.5245],
      [0.79224829, 1.634, 2, 0.1668, 0.1758, 0.6407, 5.039],
      [-0.049386338, 6.13, 2, 42.2358, 1357.6577, 1.076, 0.959],
    ],
  },
  phases: {
    kind: "vapour-pressure",
    // Where dp/drho and d2p/drho2 of this equation vanish together, from the equation.
    criticalTemperature: 5.195300013636, // K
    criticalPressure: 228322.78921, // Pa
    criticalDensity: 17384.92293, // mol/m3
    // Own fits to states of this equation; starting values only. Pressure: n, k.
    pressureGuess: [
      [-4.0752839, 1],
      [0.99464129, 1.5],
      [-0.67376403, 2],
      [5.478154, 2.5],
      [-6.8133768, 3],
      [5.7034297, 4],
      [-2.5102644, 5],
    ],
    guessTolerance: 0.0005,
    guess: {
      acentricFactor: -0.385,
      liquidDensity: [1, 0.78424, 3.2336, -7.6117, 9.2857, -4.6561],
      vapourCompressibility: [0.29939, 0.34829, 0.44307, 0.31146, 0.029233, -0.35486],
    },
  },
  transport: {
    kind: "helium",
    source:
      "viscosity V. D. Arp, R. D. McCarty, D. G. Friend, NIST Technical Note 1334 (1998); conductivity B. A. Hands, V. D. Arp, Cryogenics 21 (1981) 697-703",
    diluteViscosity: [-0.135311743, 1.00347841, 1.20654649, -0.149564551, 0.012520841],
    denseViscosity: [
      [-47.5295259, 87.6799309, -42.0741589, 8.33128289, -0.589252385],
      [547.309267, -904.870586, 431.404928, -81.4504854, 5.37008433],
      [-1684.39324, 3331.0863, -1632.19172, 308.804413, -20.2936367],
    ],
    hotViscosity: { n: 196, t: 0.71938, exponents: [-4.1249, 12.451, -295.67] },
    diluteConductivity: { n: 2.7870034e-3, t: 0.7034007057, exponents: [0, 3.739232544, -26.20316969, 59.82252246, -49.26397634] },
    conductivity: {
      linear: [1.86297053e-4, -1.427549651e-4, 3.290833592e-5, -7.275964435e-7],
      cubic: [-5.213335363e-8, 4.492659933e-8, -5.924416513e-9],
      logarithmic: [7.087321137e-6, -6.013335678e-6, 8.067145814e-7, 0, 3.995125013e-7],
    },
    logarithmDensity: 68, // kg/m3
    lowestConductivityTemperature: 12, // K
  },
};
