import type { IdealTerms } from "./fluid-data.js";
import { TauPowers } from "./tau-powers.js";

/** theta tau beyond which exp(-theta tau) is lost beside 1 in double precision. */
const LOST_BESIDE_ONE = 40;

/**
 * The part of the ideal-gas Helmholtz energy that depends on temperature, alpha0 - ln(delta), and its derivatives.
 * Results are left in the fields; nothing is allocated after construction.
 */
export class IdealHelmholtz {
  /** alpha0 - ln(delta) */
  value = 0;
  /** tau * d alpha0 / d tau */
  tau1 = 0;
  /** tau^2 * d2 alpha0 / d tau^2 */
  tau2 = 0;

  private readonly coefficients: Float64Array;
  private readonly exponents: Float64Array;
  private readonly powers: TauPowers;
  private readonly einstein: Float64Array;
  private readonly offsetEinstein: Float64Array;

  constructor(private readonly terms: IdealTerms) {
    this.coefficients = Float64Array.from(terms.powers, ([n]) => n);
    this.exponents = Float64Array.from(terms.powers, ([, t]) => t);
    this.powers = new TauPowers(terms.powers.map(([, t]) => t));
    this.einstein = Float64Array.from(terms.einstein.flat());
    this.offsetEinstein = Float64Array.from(terms.offsetEinstein.flat());
  }

  setTau(tau: number): void {
    const { coefficients, exponents, einstein, offsetEinstein } = this;
    const { constant, linear, logarithm } = this.terms;
    const logTau = Math.log(tau);
    let value = constant + linear * tau + logarithm * logTau;
    let tau1 = linear * tau + logarithm;
    let tau2 = -logarithm;
    if (coefficients.length > 0) this.powers.set(tau, logTau);
    const { values } = this.powers;
    for (let i = 0; i < coefficients.length; i++) {
      const t = exponents[i];
      const x = coefficients[i] * values[i];
      value += x;
      tau1 += t * x;
      tau2 += t * (t - 1) * x;
    }
    // n ln(1 - e), e = exp(-theta tau)
    for (let i = 0; i < einstein.length; i += 2) {
      const n = einstein[i];
      const argument = einstein[i + 1] * tau;
      if (argument > LOST_BESIDE_ONE) continue;
      const e = Math.exp(-argument);
      const ratio = argument / (1 - e);
      value += n * Math.log1p(-e);
      tau1 += n * e * ratio;
      tau2 -= n * e * ratio * ratio;
    }
    // n ln(c + d exp(x)) = n (x + ln d + ln(1 + (c/d) exp(-x))), which does not overflow
    for (let i = 0; i < offsetEinstein.length; i += 4) {
      const n = offsetEinstein[i];
      const argument = offsetEinstein[i + 1] * tau;
      const d = offsetEinstein[i + 3];
      const e = argument > LOST_BESIDE_ONE ? 0 : (offsetEinstein[i + 2] / d) * Math.exp(-argument);
      const share = 1 / (1 + e);
      value += n * (argument + (d === 1 ? 0 : Math.log(d)) + (e === 0 ? 0 : Math.log1p(e)));
      tau1 += n * argument * share;
      tau2 += n * argument * argument * share * share * e;
    }
    this.value = value;
    this.tau1 = tau1;
    this.tau2 = tau2;
  }
}
