import { rememberTerms } from "@/lib/numeric/transition-terms";
import {
  makeSmootherNodes,
  type SmootherNodes,
  type SmootherStates,
  TwoAxisSmoother,
} from "@/lib/numeric/two-axis-smoother";

import type { TimedPlane } from "./local-velocity";
import { ERROR_SHAPE, settingsTerms, type SmootherSettings, whiteVarianceM2 } from "./smoother-settings";

/** Velocities measured by the receiver at the fixes; NaN variance where there is none. */
export type MeasuredVelocity = {
  readonly vxMps: Float64Array;
  readonly vyMps: Float64Array;
  readonly variance: Float64Array;
};

/** Smoothed nodes of one piece of a run. `fixOf[i]` is the fix at node i or -1 for a node put between fixes. */
export type SmoothedChunk = {
  readonly count: number;
  readonly timeS: Float64Array;
  readonly fixOf: Int32Array;
  readonly states: SmootherStates;
};

/** Fixes from `from` to `to` inclusive without a hole between them. */
export type FixRun = { readonly from: number; readonly to: number };

const CHUNK_NODES = 8192;
/** The backward pass starts this far beyond a piece: some correlation times of the slow error, after which the future no longer matters. */
const LOOKAHEAD_S = 180;
const LOOKAHEAD_NODES = 4096;
/** Between fixes further apart than this the path bends too much for one polynomial. */
const NODE_SPACING_S = 1.6;
const NODES_BETWEEN_MAX = 64;
const CAPACITY = CHUNK_NODES + LOOKAHEAD_NODES + 2 * NODES_BETWEEN_MAX + 2;
const SPEED_PRIOR_VARIANCE = 100;

/**
 * Runs the smoother over each run of fixes and hands the smoothed nodes to `visit`, piece by piece in time order, so that memory
 * does not grow with the track. A piece's last node is the first of the next one of the same run; a run of fewer than two fixes is
 * passed over. What `visit` receives is overwritten by the next piece.
 *
 * @example
 * smoothInChunks({ path: { count: 0, timeS: new Float64Array(0), xM: new Float64Array(0), yM: new Float64Array(0) }, runs: [], velocity: null, doubtM2: null }, { agility: { sd: 1, timeS: 1 }, noiseScaleM: 1, extraWhiteM2: 0 }, () => 0); // undefined
 */
export function smoothInChunks(
  input: {
    readonly path: TimedPlane;
    readonly runs: readonly FixRun[];
    readonly velocity: MeasuredVelocity | null;
    /** Extra variance of each fix's position (m2), or null when all are as good as usual. */
    readonly doubtM2: Float64Array | null;
  },
  settings: SmootherSettings,
  visit: (chunk: SmoothedChunk) => void,
): void {
  const smoother = new TwoAxisSmoother({
    capacity: CAPACITY,
    terms: rememberTerms(settingsTerms(settings)),
    positionVariance: whiteVarianceM2(settings.noiseScaleM, settings.extraWhiteM2),
  });
  const nodes = makeSmootherNodes(CAPACITY);
  const fixOf = new Int32Array(CAPACITY);
  for (const run of input.runs) {
    if (run.to <= run.from) continue;
    smoother.start(priorAt(input.path, run.from, settings));
    for (let first = run.from; first < run.to;) {
      const last = loadNodes(input, { from: first, to: run.to }, nodes, fixOf);
      const states = smoother.run(nodes);
      visit({ count: last + 1, timeS: nodes.timeS, fixOf, states });
      first = fixOf[last] as number;
      smoother.continueFrom(last);
    }
  }
}

function priorAt(path: TimedPlane, fix: number, settings: SmootherSettings) {
  const scale = settings.noiseScaleM;
  return {
    xM: path.xM[fix] as number,
    yM: path.yM[fix] as number,
    vxMps: 0,
    vyMps: 0,
    variances: [
      25 + 4 * scale * scale,
      SPEED_PRIOR_VARIANCE,
      settings.agility.sd ** 2,
      (ERROR_SHAPE.fast * scale) ** 2,
      (ERROR_SHAPE.slow * scale) ** 2,
    ] as [number, number, number, number, number],
  };
}

type Input = {
  readonly path: TimedPlane;
  readonly velocity: MeasuredVelocity | null;
  readonly doubtM2: Float64Array | null;
};

/** Fills `nodes` from fix `from` on; returns the index of the last node that belongs to the piece, which is at a fix. */
function loadNodes(input: Input, run: FixRun, nodes: SmootherNodes, fixOf: Int32Array): number {
  const { timeS, xM, yM } = input.path;
  nodes.count = 0;
  let last = -1;
  for (let i = run.from; i <= run.to; i++) {
    if (i > run.from) addNodesBetween(nodes, fixOf, timeS[i - 1] as number, timeS[i] as number);
    const k = nodes.count++;
    fixOf[k] = i;
    nodes.timeS[k] = timeS[i] as number;
    nodes.xM[k] = xM[i] as number;
    nodes.yM[k] = yM[i] as number;
    nodes.extraVariance[k] = input.doubtM2 ? (input.doubtM2[i] as number) : 0;
    nodes.vxMps[k] = input.velocity ? (input.velocity.vxMps[i] as number) : NaN;
    nodes.vyMps[k] = input.velocity ? (input.velocity.vyMps[i] as number) : NaN;
    nodes.velocityVariance[k] = input.velocity ? (input.velocity.variance[i] as number) : NaN;
    if (last < 0 && k >= CHUNK_NODES) last = k;
    const beyond = last >= 0 ? (timeS[i] as number) - (nodes.timeS[last] as number) : 0;
    if (last >= 0 && (k - last >= LOOKAHEAD_NODES || beyond >= LOOKAHEAD_S)) break;
    if (i === run.to && last < 0) last = k;
  }
  return fixOf[nodes.count - 1] === run.to && nodes.count - 1 - last < 256 ? nodes.count - 1 : last;
}

function addNodesBetween(nodes: SmootherNodes, fixOf: Int32Array, t0: number, t1: number): void {
  const parts = Math.min(NODES_BETWEEN_MAX, Math.ceil((t1 - t0) / NODE_SPACING_S));
  for (let p = 1; p < parts; p++) {
    const k = nodes.count++;
    fixOf[k] = -1;
    nodes.timeS[k] = t0 + ((t1 - t0) * p) / parts;
    nodes.xM[k] = NaN;
    nodes.yM[k] = NaN;
    nodes.extraVariance[k] = 0;
    nodes.velocityVariance[k] = NaN;
  }
}
