import { TERM, type TransitionTerms } from "./transition-terms";

/*
 * Symmetric 5 x 5 matrices are kept as their upper triangle, row by row, 15 numbers:
 *   0  1  2  3  4
 *      5  6  7  8
 *         9 10 11
 *           12 13
 *              14
 * Written out element by element: this is the innermost loop of the analysis and a general product costs five times as much.
 */

/** Numbers in a packed symmetric 5 x 5 matrix. */
export const PACKED = 15;

/**
 * Covariance after a step, P = F P F' + Q, in place; F has the structure of `TransitionTerms`.
 * Source: Kalman, J. Basic Eng. 82 (1960).
 */
export function predictCovariance(p: Float64Array, terms: TransitionTerms): void {
  const t = terms[TERM.step] as number;
  const f13 = terms[TERM.positionFromAcceleration] as number;
  const f23 = terms[TERM.velocityFromAcceleration] as number;
  const e = terms[TERM.accelerationDecay] as number;
  const ef = terms[TERM.fastDecay] as number;
  const es = terms[TERM.slowDecay] as number;
  const p00 = p[0] as number;
  const p01 = p[1] as number;
  const p02 = p[2] as number;
  const p11 = p[5] as number;
  const p12 = p[6] as number;
  const p13 = p[7] as number;
  const p14 = p[8] as number;
  const p22 = p[9] as number;
  const p23 = p[10] as number;
  const p24 = p[11] as number;
  const a01 = p01 + t * p11 + f13 * p12;
  const a02 = p02 + t * p12 + f13 * p22;
  const a11 = p11 + f23 * p12;
  const a12 = p12 + f23 * p22;
  p[0] = p00 + t * p01 + f13 * p02 + t * a01 + f13 * a02 + (terms[TERM.q11] as number);
  p[1] = a01 + f23 * a02 + (terms[TERM.q12] as number);
  p[2] = e * a02 + (terms[TERM.q13] as number);
  p[3] = ef * ((p[3] as number) + t * p13 + f13 * p23);
  p[4] = es * ((p[4] as number) + t * p14 + f13 * p24);
  p[5] = a11 + f23 * a12 + (terms[TERM.q22] as number);
  p[6] = e * a12 + (terms[TERM.q23] as number);
  p[7] = ef * (p13 + f23 * p23);
  p[8] = es * (p14 + f23 * p24);
  p[9] = e * e * p22 + (terms[TERM.q33] as number);
  p[10] = e * ef * p23;
  p[11] = e * es * p24;
  p[12] = ef * ef * (p[12] as number) + (terms[TERM.qFast] as number);
  p[13] = ef * es * (p[13] as number);
  p[14] = es * es * (p[14] as number) + (terms[TERM.qSlow] as number);
}

/** Removes h h' / s from a packed matrix in place: the measurement update, h = P H', s the innovation variance. */
export function subtractOuter(p: Float64Array, h: Float64Array, s: number): void {
  let k = 0;
  for (let i = 0; i < 5; i++) {
    const gain = (h[i] as number) / s;
    for (let j = i; j < 5; j++) {
      p[k] = (p[k] as number) - gain * (h[j] as number);
      k++;
    }
  }
}

/** The product of a packed symmetric matrix, `at` its first element in `p`, with a vector of five, into `out`. */
export function multiplyPacked(p: Float64Array, at: number, v: Float64Array, out: Float64Array): void {
  const v0 = v[0] as number;
  const v1 = v[1] as number;
  const v2 = v[2] as number;
  const v3 = v[3] as number;
  const v4 = v[4] as number;
  const p1 = p[at + 1] as number;
  const p2 = p[at + 2] as number;
  const p3 = p[at + 3] as number;
  const p4 = p[at + 4] as number;
  const p6 = p[at + 6] as number;
  const p7 = p[at + 7] as number;
  const p8 = p[at + 8] as number;
  const p10 = p[at + 10] as number;
  const p11 = p[at + 11] as number;
  const p13 = p[at + 13] as number;
  out[0] = (p[at] as number) * v0 + p1 * v1 + p2 * v2 + p3 * v3 + p4 * v4;
  out[1] = p1 * v0 + (p[at + 5] as number) * v1 + p6 * v2 + p7 * v3 + p8 * v4;
  out[2] = p2 * v0 + p6 * v1 + (p[at + 9] as number) * v2 + p10 * v3 + p11 * v4;
  out[3] = p3 * v0 + p7 * v1 + p10 * v2 + (p[at + 12] as number) * v3 + p13 * v4;
  out[4] = p4 * v0 + p8 * v1 + p11 * v2 + p13 * v3 + (p[at + 14] as number) * v4;
}

/** The information matrix carried one step back, L = F' L F, in place. Source: Bierman, Factorization Methods (1977), X.3. */
export function carryInformationBack(l: Float64Array, terms: TransitionTerms): void {
  const t = terms[TERM.step] as number;
  const f13 = terms[TERM.positionFromAcceleration] as number;
  const f23 = terms[TERM.velocityFromAcceleration] as number;
  const e = terms[TERM.accelerationDecay] as number;
  const ef = terms[TERM.fastDecay] as number;
  const es = terms[TERM.slowDecay] as number;
  const l00 = l[0] as number;
  const l01 = l[1] as number;
  const l02 = l[2] as number;
  const l03 = l[3] as number;
  const l04 = l[4] as number;
  const l11 = l[5] as number;
  const l12 = l[6] as number;
  const l13 = l[7] as number;
  const l14 = l[8] as number;
  const a01 = t * l00 + l01;
  const b01 = f13 * l00 + f23 * l01 + e * l02;
  const b11 = f13 * l01 + f23 * l11 + e * l12;
  const b12 = f13 * l02 + f23 * l12 + e * (l[9] as number);
  l[1] = a01;
  l[2] = b01;
  l[3] = ef * l03;
  l[4] = es * l04;
  l[5] = t * a01 + t * l01 + l11;
  l[6] = t * b01 + b11;
  l[7] = ef * (t * l03 + l13);
  l[8] = es * (t * l04 + l14);
  l[9] = f13 * b01 + f23 * b11 + e * b12;
  l[10] = ef * (f13 * l03 + f23 * l13 + e * (l[10] as number));
  l[11] = es * (f13 * l04 + f23 * l14 + e * (l[11] as number));
  l[12] = ef * ef * (l[12] as number);
  l[13] = ef * es * (l[13] as number);
  l[14] = es * es * (l[14] as number);
}
