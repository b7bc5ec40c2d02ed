import type { State } from "./state.js";
import type { HeliumTransportData } from "./transport-data.js";
import type { TransportModel } from "./transport-model.js";

/** K: above it the dilute viscosity follows its own formula. */
const HOT = 100;
/** K: the logarithm of temperature is taken of at most this. */
const HIGHEST = 300;
/** Pa s in a ug/(cm s), and g/cm3 in a kg/m3. */
const MICROGRAM_PER_CENTIMETRE_SECOND = 1e-7;
const GRAM_PER_CUBIC_CENTIMETRE = 1e-3;

/**
 * Helium. Viscosity after V. D. Arp, R. D. McCarty and D. G. Friend, NIST Technical Note 1334 (1998); thermal conductivity
 * after B. A. Hands and V. D. Arp, Cryogenics 21 (1981) 697-703, without its critical enhancement.
 */
export class HeliumTransport implements TransportModel {
  constructor(private readonly data: HeliumTransportData) {}

  viscosity({ temperature, density }: State): number {
    const { diluteViscosity, denseViscosity, hotViscosity } = this.data;
    const x = Math.log(Math.min(temperature, HIGHEST));
    const ofLogarithm = (coefficients: readonly number[]): number => coefficients.reduce((sum, c, i) => sum + c * x ** (i - 1), 0);
    const rho = density * GRAM_PER_CUBIC_CENTIMETRE;
    const logDilute = ofLogarithm(diluteViscosity);
    let logarithm = logDilute;
    denseViscosity.forEach((coefficients, i) => (logarithm += ofLogarithm(coefficients) * rho ** (i + 1)));
    let viscosity = Math.exp(logarithm);
    if (temperature > HOT) viscosity += thermal(hotViscosity, temperature) - Math.exp(logDilute);
    return viscosity * MICROGRAM_PER_CENTIMETRE_SECOND;
  }

  thermalConductivity({ temperature, density }: State): number {
    const { diluteConductivity, conductivity, logarithmDensity } = this.data;
    const third = Math.cbrt(temperature);
    const powers = [1, third, third * third, temperature, 1 / temperature];
    const ofTemperature = (coefficients: readonly number[]): number => coefficients.reduce((sum, c, i) => sum + c * powers[i], 0);
    return (
      thermal(diluteConductivity, temperature) +
      ofTemperature(conductivity.linear) * density +
      ofTemperature(conductivity.cubic) * density ** 3 +
      ofTemperature(conductivity.logarithmic) * density ** 2 * Math.log(density / logarithmDensity)
    );
  }

  conductivityReason({ temperature }: State): string | null {
    const { lowestConductivityTemperature } = this.data;
    if (temperature >= lowestConductivityTemperature) return null;
    return `below ${lowestConductivityTemperature} K its critical enhancement counts, which is not at hand`;
  }
}

/** n T^t exp(a_0 + a_1 / T + a_2 / T^2...). */
function thermal({ n, t, exponents }: { n: number; t: number; exponents: readonly number[] }, temperature: number): number {
  return n * temperature ** t * Math.exp(exponents.reduceRight((sum, a) => sum / temperature + a, 0));
}
