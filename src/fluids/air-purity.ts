/** Highest pressure dew point (K) of each water class of compressed air, ISO 8573-1:2010, classes 1 to 6. */
const CLASSES = [-70, -40, -20, 3, 7, 10].map((celsius) => celsius + 273.15);

/** Pressure dew point (K) that a water class allows; undefined for a number that is no class from 1 to 6. */
export function purityClassDewPoint(waterClass: number): number | undefined {
  return CLASSES[waterClass - 1];
}

/** The best water class that a pressure dew point (K) meets; null for one wetter than class 6. */
export function purityClass(pressureDewPoint: number): number | null {
  // A dew point computed from a class must fall into it.
  const found = CLASSES.findIndex((limit) => pressureDewPoint <= limit + 1e-6);
  return found < 0 ? null : found + 1;
}
