import type { PairParameters } from "./data/air-mixture.js";

/** A component's reducing point. */
export interface ReducingPoint {
  readonly name: string;
  /** K */
  readonly reducingTemperature: number;
  /** mol/m3 */
  readonly reducingDensity: number;
}

/**
 * The reducing temperature and volume of a mixture and their derivatives by the mole numbers
 * (Kunz and Wagner 2012, equations 16, 17 and table B7). Results are left in the fields.
 */
export class ReducingFunctions {
  /** K */
  temperature = NaN;
  /** mol/m3 */
  density = NaN;
  /** (n dTr/dn_i) / Tr */
  readonly temperatureByMoles: Float64Array;
  /** (n dvr/dn_i) / vr */
  readonly volumeByMoles: Float64Array;

  private readonly size: number;
  /** For each pair, i < j: beta squared and the whole constant factor, of temperature and of volume. */
  private readonly betaT2: Float64Array;
  private readonly factorT: Float64Array;
  private readonly betaV2: Float64Array;
  private readonly factorV: Float64Array;
  private readonly ownT: Float64Array;
  private readonly ownV: Float64Array;

  constructor(points: readonly ReducingPoint[], pairs: readonly PairParameters[]) {
    const size = points.length;
    this.size = size;
    this.temperatureByMoles = new Float64Array(size);
    this.volumeByMoles = new Float64Array(size);
    this.ownT = Float64Array.from(points, ({ reducingTemperature }) => reducingTemperature);
    this.ownV = Float64Array.from(points, ({ reducingDensity }) => 1 / reducingDensity);
    this.betaT2 = new Float64Array(size * size);
    this.factorT = new Float64Array(size * size);
    this.betaV2 = new Float64Array(size * size);
    this.factorV = new Float64Array(size * size);
    for (let i = 0; i < size; i++) {
      for (let j = i + 1; j < size; j++) {
        const { betaT, gammaT, betaV, gammaV } = pairOf(points[i].name, points[j].name, pairs);
        const at = i * size + j;
        this.betaT2[at] = betaT * betaT;
        this.factorT[at] = 2 * betaT * gammaT * Math.sqrt(this.ownT[i] * this.ownT[j]);
        this.betaV2[at] = betaV * betaV;
        this.factorV[at] = (2 * betaV * gammaV * (Math.cbrt(this.ownV[i]) + Math.cbrt(this.ownV[j])) ** 3) / 8;
      }
    }
  }

  /** Sets the composition, in mole fractions. */
  set(x: Float64Array): void {
    this.temperature = this.combine(x, this.ownT, this.betaT2, this.factorT, this.temperatureByMoles);
    this.density = 1 / this.combine(x, this.ownV, this.betaV2, this.factorV, this.volumeByMoles);
  }

  /** sum x_i^2 Y_i + sum over pairs of f x_i x_j (x_i + x_j) / (beta^2 x_i + x_j); leaves (n dY/dn_i) / Y. */
  private combine(x: Float64Array, own: Float64Array, beta2: Float64Array, factor: Float64Array, byMoles: Float64Array): number {
    const { size } = this;
    let value = 0;
    for (let i = 0; i < size; i++) {
      value += x[i] * x[i] * own[i];
      byMoles[i] = 2 * x[i] * own[i];
    }
    for (let i = 0; i < size; i++) {
      for (let j = i + 1; j < size; j++) {
        const at = i * size + j;
        const a = x[i];
        const b = x[j];
        const below = beta2[at] * a + b;
        if (below === 0) continue;
        const term = (factor[at] * a * b * (a + b)) / below;
        value += term;
        // d/da of a b (a + b) / (beta2 a + b), and the same for b.
        byMoles[i] += (factor[at] * b * (2 * a + b)) / below - (term * beta2[at]) / below;
        byMoles[j] += (factor[at] * a * (a + 2 * b)) / below - term / below;
      }
    }
    // n dY/dn_i = dY/dx_i - sum x_k dY/dx_k, the fractions taken as independent.
    let mean = 0;
    for (let i = 0; i < size; i++) mean += x[i] * byMoles[i];
    for (let i = 0; i < size; i++) byMoles[i] = (byMoles[i] - mean) / value;
    return value;
  }
}

function pairOf(first: string, second: string, pairs: readonly PairParameters[]): PairParameters {
  for (const pair of pairs) {
    if (pair.components[0] === first && pair.components[1] === second) return pair;
    if (pair.components[0] === second && pair.components[1] === first) {
      return { ...pair, components: [first, second], betaT: 1 / pair.betaT, betaV: 1 / pair.betaV };
    }
  }
  throw new Error(`no mixture parameters for ${first} and ${second}`);
}
