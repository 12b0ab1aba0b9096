/**
 * Transition of one axis of the smoother over one step, flat, in the order of the `TERM` indices. The state is
 * position, velocity, acceleration, fast error, slow error; the first three are coupled, the errors decay by
 * themselves. `Q..` are the variances and covariances that the step adds.
 */
export type TransitionTerms = Float64Array;

/** Indices into `TransitionTerms`. */
export const TERM = {
  step: 0,
  positionFromAcceleration: 1,
  velocityFromAcceleration: 2,
  accelerationDecay: 3,
  fastDecay: 4,
  slowDecay: 5,
  q11: 6,
  q12: 7,
  q13: 8,
  q22: 9,
  q23: 10,
  q33: 11,
  qFast: 12,
  qSlow: 13,
} as const;

const TERM_COUNT = 14;

/**
 * A first-order Gauss-Markov process: standard deviation and correlation time in seconds. A standard deviation of 0 switches it off.
 */
export type GaussMarkov = { readonly sd: number; readonly timeS: number };

/** Singer motion with two correlated measurement errors, all per axis. */
export type SingerModel = {
  readonly acceleration: GaussMarkov;
  readonly fastError: GaussMarkov;
  readonly slowError: GaussMarkov;
};

/**
 * Transition for motion whose acceleration is a Gauss-Markov process (Singer's model) and whose position is
 * measured with a fast and a slow correlated error. `stepS` in seconds, positive.
 * Source: Singer, IEEE Trans. AES-6 (1970), eqs. 7 to 12; the series for a short step is its limit, white jerk.
 *
 * @example
 * singerTerms(1, { acceleration: { sd: 1, timeS: 2 }, fastError: { sd: 0, timeS: 3 }, slowError: { sd: 0, timeS: 45 } })[0]; // 1
 */
export function singerTerms(stepS: number, model: SingerModel): TransitionTerms {
  const terms = new Float64Array(TERM_COUNT);
  const rate = 1 / model.acceleration.timeS;
  const density = 2 * model.acceleration.sd ** 2 * rate;
  const aT = rate * stepS;
  const e = Math.exp(-aT);
  terms[TERM.step] = stepS;
  terms[TERM.positionFromAcceleration] = (aT - 1 + e) / rate ** 2;
  terms[TERM.velocityFromAcceleration] = (1 - e) / rate;
  terms[TERM.accelerationDecay] = e;
  if (aT > 0.02) {
    const e2 = e * e;
    const h = density / 2;
    terms[TERM.q11] = (h / rate ** 5) * (1 - e2 + 2 * aT + (2 * aT ** 3) / 3 - 2 * aT * aT - 4 * aT * e);
    terms[TERM.q12] = (h / rate ** 4) * (e2 + 1 - 2 * e + 2 * aT * e - 2 * aT + aT * aT);
    terms[TERM.q13] = (h / rate ** 3) * (1 - e2 - 2 * aT * e);
    terms[TERM.q22] = (h / rate ** 3) * (4 * e - 3 - e2 + 2 * aT);
    terms[TERM.q23] = (h / rate ** 2) * (e2 + 1 - 2 * e);
    terms[TERM.q33] = (h / rate) * (1 - e2);
  } else {
    terms[TERM.q11] = (density * stepS ** 5) / 20;
    terms[TERM.q12] = (density * stepS ** 4) / 8;
    terms[TERM.q13] = (density * stepS ** 3) / 6;
    terms[TERM.q22] = (density * stepS ** 3) / 3;
    terms[TERM.q23] = (density * stepS ** 2) / 2;
    terms[TERM.q33] = density * stepS;
  }
  setErrorTerms(terms, stepS, model);
  return terms;
}

function setErrorTerms(
  terms: TransitionTerms,
  stepS: number,
  errors: { readonly fastError: GaussMarkov; readonly slowError: GaussMarkov },
): void {
  const fast = Math.exp(-stepS / errors.fastError.timeS);
  const slow = Math.exp(-stepS / errors.slowError.timeS);
  terms[TERM.fastDecay] = fast;
  terms[TERM.slowDecay] = slow;
  terms[TERM.qFast] = errors.fastError.sd ** 2 * (1 - fast * fast);
  terms[TERM.qSlow] = errors.slowError.sd ** 2 * (1 - slow * slow);
}

/**
 * Transition for constant velocity disturbed by white acceleration of the given spectral density, without
 * correlated errors. `stepS` in seconds, positive.
 * Source: Bar-Shalom, Li and Kirubarajan, Estimation with Applications to Tracking and Navigation (2001), eq. 6.2.2-12.
 *
 * @example
 * whiteAccelerationTerms(2, 0.5)[9]; // 1
 */
export function whiteAccelerationTerms(stepS: number, density: number): TransitionTerms {
  const terms = new Float64Array(TERM_COUNT);
  terms[TERM.step] = stepS;
  terms[TERM.q11] = (density * stepS ** 3) / 3;
  terms[TERM.q12] = (density * stepS ** 2) / 2;
  terms[TERM.q22] = density * stepS;
  return terms;
}

/**
 * Remembers the transition of each step length, to a tenth of a millisecond, because recordings repeat a few steps over and over.
 * The memory is bounded: after `limit` different steps it starts anew.
 *
 * @example
 * rememberTerms((s) => whiteAccelerationTerms(s, 1))(3)[9]; // 3
 */
export function rememberTerms(
  make: (stepS: number) => TransitionTerms,
  limit = 4096,
): (stepS: number) => TransitionTerms {
  const known = new Map<number, TransitionTerms>();
  return (stepS) => {
    const key = Math.max(1, Math.round(stepS * 10_000));
    let terms = known.get(key);
    if (!terms) {
      if (known.size >= limit) known.clear();
      terms = make(key / 10_000);
      known.set(key, terms);
    }
    return terms;
  };
}
