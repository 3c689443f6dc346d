/** A link along its flow: head lost from a to b, m (a booster's is negative). */
export interface Stretch {
  a: number;
  b: number;
  head: number;
}

/**
 * The circuits of one pump at given flows: every way along the flow from its discharge back to its suction. Keeps the most head that any way
 * needs from the discharge to a node and from a node to the suction, and follows when a valve takes more.
 */
export class Circuits {
  readonly toNode: Float64Array;
  readonly fromNode: Float64Array;
  private readonly leaving: number[][];
  private readonly arriving: number[][];

  private constructor(
    private readonly stretches: Stretch[],
    nodeCount: number,
    order: number[],
    readonly discharge: number,
    readonly suction: number,
  ) {
    this.leaving = Array.from({ length: nodeCount }, () => []);
    this.arriving = Array.from({ length: nodeCount }, () => []);
    stretches.forEach(({ a, b }, k) => {
      this.leaving[a].push(k);
      this.arriving[b].push(k);
    });
    this.toNode = new Float64Array(nodeCount).fill(-Infinity);
    this.fromNode = new Float64Array(nodeCount).fill(-Infinity);
    this.toNode[discharge] = 0;
    this.fromNode[suction] = 0;
    for (const v of order) for (const k of this.leaving[v]) this.toNode[stretches[k].b] = Math.max(this.toNode[stretches[k].b], this.toNode[v] + stretches[k].head);
    for (const v of order.toReversed())
      for (const k of this.arriving[v]) this.fromNode[stretches[k].a] = Math.max(this.fromNode[stretches[k].a], this.fromNode[v] + stretches[k].head);
  }

  /** Null where no way leads from discharge to suction, or flows run in a ring without a pump. */
  static of(stretches: Stretch[], nodeCount: number, discharge: number, suction: number): Circuits | null {
    const order = alongFlow(stretches, nodeCount);
    if (!order) return null;
    const circuits = new Circuits(stretches, nodeCount, order, discharge, suction);
    return circuits.requiredHead > -Infinity ? circuits : null;
  }

  /** Head of the index circuit, m. */
  get requiredHead(): number {
    return this.toNode[this.suction];
  }

  /** Most head that a circuit through a stretch needs, m; -Infinity where none passes. */
  through(k: number): number {
    const { a, b, head } = this.stretches[k];
    return this.toNode[a] + head + this.fromNode[b];
  }

  /** To be called after `head` of a stretch has grown. */
  grown(k: number): void {
    const { a, b, head } = this.stretches[k];
    this.raise(this.toNode, b, this.toNode[a] + head, this.leaving, 'b');
    this.raise(this.fromNode, a, this.fromNode[b] + head, this.arriving, 'a');
  }

  private raise(values: Float64Array, node: number, value: number, beyond: number[][], end: 'a' | 'b'): void {
    const waiting: [number, number][] = [[node, value]];
    for (let next = waiting.pop(); next; next = waiting.pop()) {
      const [v, reached] = next;
      if (!(reached > values[v] + 1e-12)) continue;
      values[v] = reached;
      for (const k of beyond[v]) waiting.push([this.stretches[k][end], reached + this.stretches[k].head]);
    }
  }
}

/** Nodes so that every stretch leads onward (A. Kahn 1962); null where stretches run in a ring. */
function alongFlow(stretches: Stretch[], nodeCount: number): number[] | null {
  const pending = new Int32Array(nodeCount);
  const leaving: number[][] = Array.from({ length: nodeCount }, () => []);
  for (const { a, b } of stretches) {
    pending[b]++;
    leaving[a].push(b);
  }
  const order: number[] = [];
  for (let v = 0; v < nodeCount; v++) if (!pending[v]) order.push(v);
  for (let next = 0; next < order.length; next++) for (const b of leaving[order[next]]) if (--pending[b] === 0) order.push(b);
  return order.length === nodeCount ? order : null;
}
