import type { Loops } from './graph/loops';
import type { LoopSolver } from './loop-matrix';

const MOST_STEPS = 2000;
const CLOSE_RATIO = 1e-9;

/**
 * The same system as the loop matrix without ever forming it: conjugate gradients (M. Hestenes and E. Stiefel 1952) with the diagonal as preconditioner.
 * For networks so interwoven (every node joined to hundreds of others) that the matrix would be full.
 */
export class LoopGradients implements LoopSolver {
  private chainSlope: Float64Array = new Float64Array(0);
  private readonly diagonal: Float64Array;
  private readonly chainFlow: Float64Array;
  private readonly residual: Float64Array;
  private readonly direction: Float64Array;
  private readonly image: Float64Array;

  constructor(
    private readonly loops: Loops,
    chainCount: number,
  ) {
    this.diagonal = new Float64Array(loops.count);
    this.chainFlow = new Float64Array(chainCount);
    this.residual = new Float64Array(loops.count);
    this.direction = new Float64Array(loops.count);
    this.image = new Float64Array(loops.count);
  }

  assemble(chainSlope: Float64Array): void {
    this.chainSlope = chainSlope;
    const { loops, diagonal } = this;
    diagonal.fill(0);
    for (let l = 0; l < loops.count; l++)
      for (let p = loops.start[l]; p < loops.start[l + 1]; p++) diagonal[l] += chainSlope[loops.chain[p]];
  }

  solve(heads: Float64Array, flows: Float64Array): void {
    const { diagonal, residual, direction, image } = this;
    const n = residual.length;
    residual.set(heads);
    flows.fill(0);
    let power = 0;
    for (let l = 0; l < n; l++) {
      direction[l] = residual[l] / diagonal[l];
      power += residual[l] * direction[l];
    }
    const goal = power * CLOSE_RATIO ** 2;
    for (let step = 0; step < MOST_STEPS && power > goal; step++) {
      this.apply(direction, image);
      let along = 0;
      for (let l = 0; l < n; l++) along += direction[l] * image[l];
      const length = power / along;
      let next = 0;
      for (let l = 0; l < n; l++) {
        flows[l] += length * direction[l];
        residual[l] -= length * image[l];
        next += (residual[l] * residual[l]) / diagonal[l];
      }
      for (let l = 0; l < n; l++) direction[l] = residual[l] / diagonal[l] + (next / power) * direction[l];
      power = next;
    }
  }

  /** Heads around the loops that flows round them make: B D Bᵀ x. */
  private apply(x: Float64Array, heads: Float64Array): void {
    const { loops, chainFlow, chainSlope } = this;
    chainFlow.fill(0);
    for (let l = 0; l < loops.count; l++)
      for (let p = loops.start[l]; p < loops.start[l + 1]; p++) chainFlow[loops.chain[p]] += loops.sign[p] * x[l];
    for (let l = 0; l < loops.count; l++) {
      let head = 0;
      for (let p = loops.start[l]; p < loops.start[l + 1]; p++)
        head += loops.sign[p] * chainSlope[loops.chain[p]] * chainFlow[loops.chain[p]];
      heads[l] = head;
    }
  }
}
