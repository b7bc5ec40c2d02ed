import type { FluidData } from "../fluid-data.js";

export const air: FluidData = {
  name: "air",
  source:
    "E. W. Lemmon, R. T Jacobsen, S. G. Penoncello, D. G. Friend, J. Phys. Chem. Ref. Data 29 (2000) 331-385, the pseudo-pure fluid equation",
  molarMass: 0.0289586, // kg/mol
  gasConstant: 8.31451, // J/(mol K)
  reducingTemperature: 132.6312, // K
  reducingDensity: 10447.7, // mol/m3
  range: {
    minimumTemperature: 59.75, // K
    belowMinimum: "where it freezes",
    maximumTemperature: 2000, // K
    maximumPressure: 100e6, // Pa; the equation itself goes to 2000 MPa
  },
  ideal: {
    constant: -13.841928076,
    linear: 17.275266575,
    logarithm: 2.490888032,
    // n, t
    powers: [
      [6.057194e-08, -3],
      [-2.10274769e-05, -2],
      [-0.000158860716, -1],
      [-0.00019536342, 1.5],
    ],
    // n, theta
    einstein: [
      [0.791309509, 25.36365],
      [0.212236768, 16.90741],
    ],
    // n, theta, c, d
    offsetEinstein: [[-0.197938904, 87.31279, 2 / 3, 1]],
  },
  residual: {
    // n, t, d, l
    powers: [
      [0.118160747229, 0, 1, 0],
      [0.713116392079, 0.33, 1, 0],
      [-1.61824192067, 1.01, 1, 0],
      [0.0714140178971, 0, 2, 0],
      [-0.0865421396646, 0, 3, 0],
      [0.134211176704, 0.15, 3, 0],
      [0.0112626704218, 0, 4, 0],
      [-0.0420533228842, 0.2, 4, 0],
      [0.0349008431982, 0.35, 4, 0],
      [0.000164957183186, 1.35, 6, 0],
      [-0.101365037912, 1.6, 1, 1],
      [-0.17381369097, 0.8, 3, 1],
      [-0.0472103183731, 0.95, 5, 1],
      [-0.0122523554253, 1.25, 6, 1],
      [-0.146629609713, 3.6, 1, 2],
      [-0.0316055879821, 6, 3, 2],
      [0.000233594806142, 3.25, 11, 2],
      [0.0148287891978, 3.5, 1, 3],
      [-0.00938782884667, 15, 3, 3],
    ],
    // n, t, d, eta, beta, gamma, epsilon
    gaussians: [],
  },
  phases: {
    kind: "bubble-and-dew",
    // The maxcondentherm, where both curves end.
    endTemperature: 132.6312, // K
    endPressure: 3785020, // Pa
    endDensity: 10447.7, // mol/m3
    // n, k
    bubblePressure: [
      [0.2260724, 0.5],
      [-7.080499, 1],
      [5.700283, 1.5],
      [-12.44017, 2],
      [17.81926, 2.5],
      [-10.81364, 3],
    ],
    dewPressure: [
      [-0.1567266, 0.5],
      [-5.539635, 1],
      [0.7567212, 2.5],
      [-3.514322, 4],
    ],
    // Own fits to states of this equation, within 0.6 %; starting values only.
    guess: {
      acentricFactor: 0.0335,
      liquidDensity: [0.85987, 3.509, -4.1537, 6.103, -2.5356],
      vapourCompressibility: [0.32572, 0.33523, 0.96644, -0.36434, 1.5538, -2.0382],
    },
  },
  transport: {
    kind: "lemmon-jacobsen",
    source: "E. W. Lemmon, R. T Jacobsen, Int. J. Thermophys. 25 (2004) 21-69",
    reducingTemperature: 132.6312, // K
    reducingDensity: 10447.7, // mol/m3
    reducingPressure: 3785020, // Pa
    collisionDiameter: 0.36, // nm
    collisionTemperature: 103.3, // K
    // N, t, d, l
    viscosity: [
      [1.072e-05, 0.2, 1, 0],
      [1.122e-06, 0.05, 4, 0],
      [2.019e-09, 2.4, 9, 0],
      [-8.876e-06, 0.6, 1, 1],
      [-2.916e-08, 3.6, 8, 1],
    ],
    diluteConductivity: { perViscosity: 0.001308, terms: [[0.001405, -1.1], [-0.001036, -0.3]] },
    conductivity: [
      [0.008743, 0.1, 1, 0],
      [0.01476, 0, 2, 0],
      [-0.01662, 0.5, 3, 2],
      [0.003793, 2.7, 7, 2],
      [-0.006142, 0.3, 7, 2],
      [-0.0003778, 1.3, 11, 2],
    ],
    enhancement: {
      cutoff: 0.31, // nm
      amplitude: 0.11, // nm
      referenceTemperature: 265.262, // K
    },
  },
};
