/**
 * Pressure ratio of each of n equal stages that lead from one pressure to a higher one and lose a fixed pressure
 * between any two of them.
 *
 * @param inletPressure Pa
 * @param outletPressure Pa, above the inlet's
 * @param drop Pa, lost after each stage but the last
 */
export function stageRatio(inletPressure: number, outletPressure: number, stages: number, drop: number): number {
  let ratio = (outletPressure / inletPressure) ** (1 / stages);
  if (drop === 0 || stages === 1) return ratio;
  // Newton on the outlet pressure, a polynomial that rises ever more steeply with the ratio: from the right of its
  // root the iterates fall to it, and the first step from the left lands on the right.
  for (let iteration = 0; iteration < MOST_ITERATIONS; iteration++) {
    let pressure = inletPressure;
    let slope = 0;
    for (let stage = 1; stage <= stages; stage++) {
      slope = slope * ratio + pressure;
      pressure = pressure * ratio - (stage < stages ? drop : 0);
    }
    const step = (outletPressure - pressure) / slope;
    ratio += step;
    if (Math.abs(step) <= 1e-14 * ratio) return ratio;
  }
  return ratio;
}

/** More than Newton needs for any ratio and drop that leave a positive pressure. */
const MOST_ITERATIONS = 60;
