import { metresPerKpa } from '@/lib/hydraulics/links/law';
import { correctionOfAll } from '@/lib/hydraulics/correction-of-all';
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
 * solution the heads round all loops are zero, so a head added in a chain moves the flows as the iteration would correct
 * it. One factorisation serves all; each unknown is one solve with it. Differential pressure controllers that throttle
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
  const { state, control } = solution;
  const kpaPerM = 1 / metresPerKpa(fluid.densityKgM3);
  const loops = correctionOfAll(network.document.nodes.length, chains);
  loops.assemble(state.chainSlope);
  const signOf = signsInChains(network);

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
  const heads = new Float64Array(chains.count);
  const step = new Float64Array(chains.count);
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
      heads[c] += signOf[i] * added;
    }
    if (isMoved) {
      loops.sumHeads(heads);
      loops.correct(step);
      control?.correct(state, loops, step);
    }
    for (let w = 0; w < watched.length; w++) {
      const i = numberOf[watched[w]];
      if (i < 0) continue;
      const c = chains.chainOf[i];
      const flow = isMoved && c >= 0 ? signOf[i] * step[c] : 0;
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
