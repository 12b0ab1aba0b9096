import { invariant } from "@/lib/errors/invariant";

import {
  carryInformationBack,
  multiplyPacked,
  PACKED,
  predictCovariance,
  subtractOuter,
} from "./covariance-steps";
import { TERM, type TransitionTerms } from "./transition-terms";

/**
 * Nodes of a piece of track. A NaN `xM` marks a node without a position, a NaN `velocityVariance` one without a velocity;
 * `extraVariance` (m2) is what a doubtful position has beyond the usual white variance.
 */
export type SmootherNodes = {
  count: number;
  readonly timeS: Float64Array;
  readonly xM: Float64Array;
  readonly yM: Float64Array;
  readonly extraVariance: Float64Array;
  readonly vxMps: Float64Array;
  readonly vyMps: Float64Array;
  readonly velocityVariance: Float64Array;
};

/** Smoothed states at the nodes; variances are per axis and the same for both. */
export type SmootherStates = {
  readonly xM: Float64Array;
  readonly yM: Float64Array;
  readonly vxMps: Float64Array;
  readonly vyMps: Float64Array;
  readonly axMps2: Float64Array;
  readonly ayMps2: Float64Array;
  readonly positionVariance: Float64Array;
  readonly velocityVariance: Float64Array;
};

/** Prior means of both axes and the prior variances of the five states. */
export type SmootherPrior = {
  readonly xM: number;
  readonly yM: number;
  readonly vxMps: number;
  readonly vyMps: number;
  readonly variances: readonly [number, number, number, number, number];
};

const AXES = 10;

/** What the position sees of the state: the position itself and both errors. */
const SEEN_BY_POSITION = [1, 0, 0, 1, 1] as const;
const SEEN_BY_VELOCITY = [0, 1, 0, 0, 0] as const;

const column = (length: number) => new Float64Array(length);

/** Empty nodes with room for `capacity` of them. */
export function makeSmootherNodes(capacity: number): SmootherNodes {
  return {
    count: 0,
    timeS: column(capacity),
    xM: column(capacity),
    yM: column(capacity),
    extraVariance: column(capacity),
    vxMps: column(capacity),
    vyMps: column(capacity),
    velocityVariance: column(capacity),
  };
}

/**
 * Kalman filter and fixed-interval smoother for a path in the plane: both axes share one covariance because they
 * share model, steps and variances. The backward pass is the modified Bryson-Frazier form, which needs no inverse.
 *
 * Use: `start` with a prior, then for each piece of the path `run(nodes)`, which returns the smoothed states of all its
 * nodes (valid until the next `run`), then `continueFrom(i)` so that the next piece, beginning with the same node i, takes up the filter
 * where this one was at that node. Times in a piece strictly rise.
 *
 * Sources: Kalman (1960); Rauch, Tung and Striebel, AIAA J. 3 (1965); Bierman, Factorization Methods for Discrete
 * Sequential Estimation (1977), X.3.
 */
export class TwoAxisSmoother {
  readonly capacity: number;
  private readonly terms: (stepS: number) => TransitionTerms;
  private readonly positionNoise: number;
  private readonly priorStates: Float64Array;
  private readonly priorCovariances: Float64Array;
  private readonly gains: Float64Array;
  private readonly velocityGains: Float64Array;
  private readonly innovations: Float64Array;
  private readonly innovationVariance: Float64Array;
  private readonly steps: TransitionTerms[] = [];
  private readonly state = column(AXES);
  private readonly covariance = column(PACKED);
  private readonly gain = column(5);
  private readonly work = column(5);
  private readonly adjoint = column(AXES);
  private readonly information = column(PACKED);
  private readonly out: SmootherStates;

  constructor(options: {
    readonly capacity: number;
    readonly terms: (stepS: number) => TransitionTerms;
    readonly positionVariance: number;
  }) {
    const { capacity } = options;
    this.capacity = capacity;
    this.terms = options.terms;
    this.positionNoise = options.positionVariance;
    this.priorStates = column(capacity * AXES);
    this.priorCovariances = column(capacity * PACKED);
    this.gains = column(capacity * 5);
    this.velocityGains = column(capacity * 5);
    this.innovations = column(capacity * 4);
    this.innovationVariance = column(capacity * 2);
    this.out = {
      xM: column(capacity),
      yM: column(capacity),
      vxMps: column(capacity),
      vyMps: column(capacity),
      axMps2: column(capacity),
      ayMps2: column(capacity),
      positionVariance: column(capacity),
      velocityVariance: column(capacity),
    };
  }

  /** Begins a path; the first node of the next piece updates this prior with no step before it. */
  start(prior: SmootherPrior): void {
    this.state.fill(0);
    this.state[0] = prior.xM;
    this.state[1] = prior.vxMps;
    this.state[5] = prior.yM;
    this.state[6] = prior.vyMps;
    this.covariance.fill(0);
    [0, 5, 9, 12, 14].forEach((at, i) => (this.covariance[at] = prior.variances[i] ?? 0));
  }

  /** Takes up the filter at node `i` of the piece just run. */
  continueFrom(i: number): void {
    this.state.set(this.priorStates.subarray(i * AXES, (i + 1) * AXES));
    this.covariance.set(this.priorCovariances.subarray(i * PACKED, (i + 1) * PACKED));
  }

  run(nodes: SmootherNodes): SmootherStates {
    invariant(nodes.count <= this.capacity, "a piece fits the smoother");
    for (let i = 0; i < nodes.count; i++) {
      if (i > 0) this.step(i, (nodes.timeS[i] as number) - (nodes.timeS[i - 1] as number));
      this.priorStates.set(this.state, i * AXES);
      this.priorCovariances.set(this.covariance, i * PACKED);
      this.measurePosition(nodes, i);
      this.measureVelocity(nodes, i);
    }
    this.adjoint.fill(0);
    this.information.fill(0);
    for (let i = nodes.count - 1; i >= 0; i--) {
      this.takeBack(this.velocityGains, i, 1);
      this.takeBack(this.gains, i, 0);
      this.smoothNode(i);
      if (i > 0) this.carryBack(i);
    }
    return this.out;
  }

  private step(i: number, stepS: number): void {
    const terms = this.terms(stepS);
    this.steps[i] = terms;
    const t = terms[TERM.step] as number;
    const f13 = terms[TERM.positionFromAcceleration] as number;
    const f23 = terms[TERM.velocityFromAcceleration] as number;
    const x = this.state;
    for (let o = 0; o < AXES; o += 5) {
      const v = x[o + 1] as number;
      const a = x[o + 2] as number;
      x[o] = (x[o] as number) + t * v + f13 * a;
      x[o + 1] = v + f23 * a;
      x[o + 2] = (terms[TERM.accelerationDecay] as number) * a;
      x[o + 3] = (terms[TERM.fastDecay] as number) * (x[o + 3] as number);
      x[o + 4] = (terms[TERM.slowDecay] as number) * (x[o + 4] as number);
    }
    predictCovariance(this.covariance, terms);
  }

  private measurePosition(nodes: SmootherNodes, i: number): void {
    this.innovationVariance[2 * i] = 0;
    const zx = nodes.xM[i] as number;
    if (!(zx === zx)) return;
    const p = this.covariance;
    const x = this.state;
    const h = this.work;
    h[0] = (p[0] as number) + (p[3] as number) + (p[4] as number);
    h[1] = (p[1] as number) + (p[7] as number) + (p[8] as number);
    h[2] = (p[2] as number) + (p[10] as number) + (p[11] as number);
    h[3] = (p[3] as number) + (p[12] as number) + (p[13] as number);
    h[4] = (p[4] as number) + (p[13] as number) + (p[14] as number);
    const s =
      (h[0] as number) +
      (h[3] as number) +
      (h[4] as number) +
      this.positionNoise +
      (nodes.extraVariance[i] as number);
    const ex = zx - (x[0] as number) - (x[3] as number) - (x[4] as number);
    const ey = (nodes.yM[i] as number) - (x[5] as number) - (x[8] as number) - (x[9] as number);
    this.update({ i, which: 0, s, ex, ey });
  }

  private measureVelocity(nodes: SmootherNodes, i: number): void {
    this.innovationVariance[2 * i + 1] = 0;
    const noise = nodes.velocityVariance[i] as number;
    if (!(noise === noise)) return;
    const p = this.covariance;
    const h = this.work;
    h[0] = p[1] as number;
    h[1] = p[5] as number;
    h[2] = p[6] as number;
    h[3] = p[7] as number;
    h[4] = p[8] as number;
    const ex = (nodes.vxMps[i] as number) - (this.state[1] as number);
    const ey = (nodes.vyMps[i] as number) - (this.state[6] as number);
    this.update({ i, which: 1, s: (h[1] as number) + noise, ex, ey });
  }

  private update(m: { i: number; which: 0 | 1; s: number; ex: number; ey: number }): void {
    const gains = m.which === 0 ? this.gains : this.velocityGains;
    this.innovationVariance[2 * m.i + m.which] = m.s;
    this.innovations[4 * m.i + 2 * m.which] = m.ex;
    this.innovations[4 * m.i + 2 * m.which + 1] = m.ey;
    const x = this.state;
    for (let a = 0; a < 5; a++) {
      const k = (this.work[a] as number) / m.s;
      gains[5 * m.i + a] = k;
      x[a] = (x[a] as number) + k * m.ex;
      x[a + 5] = (x[a + 5] as number) + k * m.ey;
    }
    subtractOuter(this.covariance, this.work, m.s);
  }

  /** One measurement of the backward pass: l = -H' e / s + C' l and L = H' H / s + C' L C with C = I - K H. */
  private takeBack(gains: Float64Array, i: number, which: 0 | 1): void {
    const s = this.innovationVariance[2 * i + which] as number;
    if (s === 0) return;
    const seen = which === 0 ? SEEN_BY_POSITION : SEEN_BY_VELOCITY;
    const l = this.adjoint;
    const k = this.gain;
    let kx = (this.innovations[4 * i + 2 * which] as number) / s;
    let ky = (this.innovations[4 * i + 2 * which + 1] as number) / s;
    for (let a = 0; a < 5; a++) {
      const g = gains[5 * i + a] as number;
      k[a] = g;
      kx += g * (l[a] as number);
      ky += g * (l[a + 5] as number);
    }
    const big = this.information;
    const lk = this.work;
    multiplyPacked(big, 0, k, lk);
    let klk = 1 / s;
    for (let a = 0; a < 5; a++) klk += (k[a] as number) * (lk[a] as number);
    let at = 0;
    for (let a = 0; a < 5; a++) {
      const ha = seen[a] as number;
      l[a] = (l[a] as number) - ha * kx;
      l[a + 5] = (l[a + 5] as number) - ha * ky;
      for (let b = a; b < 5; b++) {
        const hb = seen[b] as number;
        big[at] = (big[at] as number) - ha * (lk[b] as number) - hb * (lk[a] as number) + ha * hb * klk;
        at++;
      }
    }
  }

  private smoothNode(i: number): void {
    const p = this.priorCovariances;
    const at = i * PACKED;
    const x = i * AXES;
    const moved = this.work;
    const { out } = this;
    multiplyPacked(p, at, this.adjoint, moved);
    out.xM[i] = (this.priorStates[x] as number) - (moved[0] as number);
    out.vxMps[i] = (this.priorStates[x + 1] as number) - (moved[1] as number);
    out.axMps2[i] = (this.priorStates[x + 2] as number) - (moved[2] as number);
    multiplyPacked(p, at, this.adjoint.subarray(5), moved);
    out.yM[i] = (this.priorStates[x + 5] as number) - (moved[0] as number);
    out.vyMps[i] = (this.priorStates[x + 6] as number) - (moved[1] as number);
    out.ayMps2[i] = (this.priorStates[x + 7] as number) - (moved[2] as number);
    const row = this.gain;
    for (let a = 0; a < 5; a++) row[a] = p[at + a] as number;
    out.positionVariance[i] = Math.max(0, (p[at] as number) - this.quadratic(row));
    row[0] = p[at + 1] as number;
    for (let a = 1; a < 5; a++) row[a] = p[at + 4 + a] as number;
    out.velocityVariance[i] = Math.max(0, (p[at + 5] as number) - this.quadratic(row));
  }

  private quadratic(row: Float64Array): number {
    multiplyPacked(this.information, 0, row, this.work);
    let sum = 0;
    for (let a = 0; a < 5; a++) sum += (row[a] as number) * (this.work[a] as number);
    return sum;
  }

  private carryBack(i: number): void {
    const terms = this.steps[i] as TransitionTerms;
    const t = terms[TERM.step] as number;
    const f13 = terms[TERM.positionFromAcceleration] as number;
    const f23 = terms[TERM.velocityFromAcceleration] as number;
    const l = this.adjoint;
    for (let o = 0; o < AXES; o += 5) {
      const l0 = l[o] as number;
      const l1 = l[o + 1] as number;
      l[o + 1] = t * l0 + l1;
      l[o + 2] = f13 * l0 + f23 * l1 + (terms[TERM.accelerationDecay] as number) * (l[o + 2] as number);
      l[o + 3] = (terms[TERM.fastDecay] as number) * (l[o + 3] as number);
      l[o + 4] = (terms[TERM.slowDecay] as number) * (l[o + 4] as number);
    }
    carryInformationBack(this.information, terms);
  }
}
