import type { Loops } from './graph/loops';
import { GrowingList } from './growing-list';
import { LoopGradients } from './loop-gradients';
import { MOST_FILL, MOST_WORK, SparseLdl } from './sparse/ldl';
import type { Pattern } from './sparse/minimum-degree';

/** What corrects all loops together: filled from the slopes of the chains, then solved for any heads. */
export interface LoopSolver {
  assemble(chainSlope: Float64Array): void;
  solve(heads: Float64Array, flows: Float64Array): void;
}

/** Entries beyond which factors cost more than they save, and the loops are solved by conjugate gradients. */
const MOST_PATTERN = 3_000_000;

export function loopSolver(loops: Loops, chainCount: number): LoopSolver {
  const through = loopsThroughChains(loops, chainCount);
  const pattern = patternOf(loops, through);
  // Loops come from the ends of the network inwards, which for a tree of ladders is already an order without fill.
  const factors = pattern && (SparseLdl.inOrder(pattern) ?? SparseLdl.of(pattern, MOST_FILL, MOST_WORK));
  return factors ? new LoopMatrix(loops, through, factors) : new LoopGradients(loops, chainCount);
}

/**
 * The matrix of the simultaneous correction: on its diagonal the summed slopes of each loop, beside it the slopes of the chains
 * that two loops share, with the sign of their directions.
 */
class LoopMatrix implements LoopSolver {
  private readonly shared: SharedChains;

  constructor(
    private readonly loops: Loops,
    through: ThroughChains,
    private readonly factors: SparseLdl,
  ) {
    this.shared = sharedChains(through, factors);
  }

  solve(heads: Float64Array, flows: Float64Array): void {
    this.factors.solve(heads, flows);
  }

  assemble(chainSlope: Float64Array): void {
    const { loops, factors, shared } = this;
    const { diagonal, value } = factors;
    for (let l = 0; l < loops.count; l++) {
      let sum = 0;
      for (let p = loops.start[l]; p < loops.start[l + 1]; p++) sum += chainSlope[loops.chain[p]];
      diagonal[l] = sum;
    }
    value.fill(0);
    const { slot, chain, sign } = shared;
    for (let t = 0; t < slot.length; t++) value[slot[t]] += sign[t] * chainSlope[chain[t]];
    factors.factorize();
  }
}

/** Loops through each chain, with the direction in which each takes it. */
interface ThroughChains {
  start: Int32Array;
  loop: Int32Array;
  sign: Int8Array;
}

interface SharedChains {
  slot: Int32Array;
  chain: Int32Array;
  sign: Int8Array;
}

function loopsThroughChains(loops: Loops, chainCount: number): ThroughChains {
  const start = new Int32Array(chainCount + 1);
  for (const c of loops.chain) start[c + 1]++;
  for (let c = 0; c < chainCount; c++) start[c + 1] += start[c];
  const next = start.slice(0, chainCount);
  const loop = new Int32Array(loops.chain.length);
  const sign = new Int8Array(loops.chain.length);
  for (let l = 0; l < loops.count; l++)
    for (let p = loops.start[l]; p < loops.start[l + 1]; p++) {
      const at = next[loops.chain[p]]++;
      loop[at] = l;
      sign[at] = loops.sign[p];
    }
  return { start, loop, sign };
}

function patternOf(loops: Loops, through: ThroughChains): Pattern | null {
  const start = new Int32Array(loops.count + 1);
  const index = new GrowingList(2 * loops.chain.length);
  const met = new Int32Array(loops.count).fill(-1);
  for (let l = 0; l < loops.count; l++) {
    met[l] = l;
    for (let p = loops.start[l]; p < loops.start[l + 1]; p++) {
      const c = loops.chain[p];
      for (let t = through.start[c]; t < through.start[c + 1]; t++) {
        const other = through.loop[t];
        if (met[other] === l) continue;
        met[other] = l;
        index.push(other);
      }
    }
    if (index.length > MOST_PATTERN) return null;
    start[l + 1] = index.length;
  }
  return { size: loops.count, start, index: index.toArray() };
}

function sharedChains(through: ThroughChains, factors: SparseLdl): SharedChains {
  const slot = new GrowingList(through.loop.length);
  const chain = new GrowingList(through.loop.length);
  const sign = new GrowingList(through.loop.length);
  for (let c = 0; c + 1 < through.start.length; c++)
    for (let a = through.start[c]; a < through.start[c + 1]; a++)
      for (let b = through.start[c]; b < a; b++) {
        slot.push(factors.slot(through.loop[a], through.loop[b]));
        chain.push(c);
        sign.push(through.sign[a] * through.sign[b]);
      }
  return { slot: slot.toArray(), chain: chain.toArray(), sign: Int8Array.from(sign.toArray()) };
}
