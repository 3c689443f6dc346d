import { metresPerKpa } from '@/lib/hydraulics/links/law';
import { loopSolver } from '@/lib/hydraulics/loop-matrix';
import type { PreparedNetwork } from '@/lib/hydraulics/prepare';
import type { Solution } from '@/lib/hydraulics/solve';
import type { Unknown } from './unknowns';

/** Flow and head loss of a link and how both answer to each unknown, per unit of its logarithm. */
export interface LinkAnswers {
  flowLs: number;
  dropKpa: number;
  flowPerUnknown: Float64Array;
  dropPerUnknown: Float64Array;
}

/**
 * Answers of the watched links (document positions) to every unknown that acts, by the implicit-function theorem: at a
 * solution the heads round all loops are zero, so a head d added in a chain moves the loops' flows by -M⁻¹ L d, M being the matrix of
 * the last correction. One factorisation serves all; each unknown is one solve with it. Differential pressure controllers that throttle
 * keep their set point. A shut link answers with zero.
 */
export function linkAnswers(
  network: PreparedNetwork,
  solution: Solution,
  unknowns: Unknown[],
  acts: (unknown: Unknown) => boolean,
  watched: number[],
): LinkAnswers[] {
  const { chains, numberOf, fluid } = network;
  const { state, loops, control } = solution;
  const kpaPerM = 1 / metresPerKpa(fluid.densityKgM3);
  const solver = loopSolver(loops, chains.count);
  solver.assemble(state.chainSlope);
  const signOf = signsInChains(network);
  const loopsOf = loopsThroughChains(solution, chains.count);

  const answers = watched.map((at): LinkAnswers => {
    const i = numberOf[at];
    const column = () => new Float64Array(unknowns.length);
    return {
      flowLs: i < 0 ? 0 : state.linkFlow[i],
      dropKpa: i < 0 ? 0 : state.linkLoss[i] * kpaPerM,
      flowPerUnknown: column(),
      dropPerUnknown: column(),
    };
  });
  const seen = loopsThroughLinks(
    watched.map((at) => numberOf[at]),
    chains.chainOf,
    loopsOf,
    signOf,
  );
  const heads = new Float64Array(loops.count);
  const step = new Float64Array(loops.count);
  const { linkLoss } = state;
  const lossBefore = linkLoss.slice();

  /** The unknown solved last, by position. */
  let solved = -1;
  unknowns.forEach((unknown, j) => {
    if (!unknown.links.length || !acts(unknown)) return;
    if (solved >= 0 && isAlike(unknown, unknowns[solved])) {
      for (const answer of answers) {
        answer.flowPerUnknown[j] = answer.flowPerUnknown[solved];
        answer.dropPerUnknown[j] = answer.dropPerUnknown[solved];
      }
      return;
    }
    solved = j;
    heads.fill(0);
    let isMoved = false;
    for (const at of unknown.links) {
      const i = numberOf[at];
      if (i < 0) continue;
      // A Kv goes into its loss with the power -2, a resistance or a pump's head with 1.
      const added = perUnit(unknown) * lossBefore[i];
      linkLoss[i] += added;
      const c = chains.chainOf[i];
      if (c < 0) continue;
      isMoved = true;
      for (const { loop, sign } of loopsOf[c]) heads[loop] += sign * signOf[i] * added;
    }
    if (isMoved) {
      solver.solve(heads, step);
      for (let l = 0; l < step.length; l++) step[l] = -step[l];
      control?.correct(state, loops, solver, step);
    }
    for (let w = 0; w < seen.count; w++) {
      let flow = 0;
      if (isMoved) for (let p = seen.start[w]; p < seen.start[w + 1]; p++) flow += seen.sign[p] * step[seen.loop[p]];
      const i = seen.number[w];
      if (i < 0) continue;
      answers[w].flowPerUnknown[j] = flow;
      answers[w].dropPerUnknown[j] = (state.linkSlope[i] * flow + linkLoss[i] - lossBefore[i]) * kpaPerM;
    }
    for (const at of unknown.links) if (numberOf[at] >= 0) linkLoss[numberOf[at]] = lossBefore[numberOf[at]];
  });
  return answers;
}

const perUnit = ({ kind }: Unknown) => (kind === 'chart' || kind === 'setting' ? -2 : 1);

/** A valve's chart and its setting act in the same way. */
const isAlike = (a: Unknown, b: Unknown) =>
  a.links.length === 1 && b.links.length === 1 && a.links[0] === b.links[0] && perUnit(a) === perUnit(b);

function signsInChains({ chains, from }: PreparedNetwork): Int8Array {
  const signOf = new Int8Array(from.length);
  chains.member.forEach((i, p) => (signOf[i] = chains.sign[p]));
  return signOf;
}

function loopsThroughChains({ loops }: Solution, chainCount: number): { loop: number; sign: number }[][] {
  const through: { loop: number; sign: number }[][] = Array.from({ length: chainCount }, () => []);
  for (let l = 0; l < loops.count; l++)
    for (let p = loops.start[l]; p < loops.start[l + 1]; p++) through[loops.chain[p]].push({ loop: l, sign: loops.sign[p] });
  return through;
}

/** Loops through each watched link in plain arrays: they are gone through once for every unknown. */
function loopsThroughLinks(numbers: number[], chainOf: Int32Array, loopsOf: { loop: number; sign: number }[][], signOf: Int8Array) {
  const start = [0];
  const loop: number[] = [];
  const sign: number[] = [];
  for (const i of numbers) {
    for (const through of i < 0 || chainOf[i] < 0 ? [] : loopsOf[chainOf[i]]) {
      loop.push(through.loop);
      sign.push(through.sign * signOf[i]);
    }
    start.push(loop.length);
  }
  return {
    count: numbers.length,
    number: Int32Array.from(numbers),
    start: Int32Array.from(start),
    loop: Int32Array.from(loop),
    sign: Int8Array.from(sign),
  };
}
