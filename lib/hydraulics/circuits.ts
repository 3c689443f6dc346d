/** A link along its flow: head lost from a to b, m (a booster's is negative), and whether it is a terminal. */
export interface Stretch {
  a: number;
  b: number;
  head: number;
  isTerminal: boolean;
}

/** A stretch as walked on one of two floors: below, no terminal has been passed yet; a terminal leads up. */
interface Walk {
  a: number;
  b: number;
  stretch: number;
}

/**
 * The circuits of one pump at given flows: every way along the flow from its discharge through a terminal back to its suction. A way
 * that passes no terminal (a bypass) makes no demand; only a pump without terminals, as in a decoupled primary
 * circuit, is asked for what its bare ways need. Keeps the most head needed to and from every place, and follows when a valve takes more.
 */
export class Circuits {
  private readonly toPlace: Float64Array;
  private readonly fromPlace: Float64Array;
  private readonly leaving: Walk[][];
  private readonly arriving: Walk[][];
  private readonly walksOf: Walk[][];
  private readonly goal: number;

  private constructor(
    private readonly stretches: Stretch[],
    nodeCount: number,
    order: number[],
    readonly discharge: number,
    readonly suction: number,
  ) {
    const lists = <T>(count: number) => Array.from({ length: count }, (): T[] => []);
    this.leaving = lists<Walk>(2 * nodeCount);
    this.arriving = lists<Walk>(2 * nodeCount);
    this.walksOf = lists<Walk>(stretches.length);
    const add = (a: number, b: number, stretch: number) => {
      const walk = { a, b, stretch };
      this.leaving[a].push(walk);
      this.arriving[b].push(walk);
      this.walksOf[stretch].push(walk);
    };
    stretches.forEach(({ a, b, isTerminal }, k) => {
      add(a, isTerminal ? b + nodeCount : b, k);
      add(a + nodeCount, b + nodeCount, k);
    });

    this.toPlace = new Float64Array(2 * nodeCount).fill(-Infinity);
    this.fromPlace = new Float64Array(2 * nodeCount).fill(-Infinity);
    const places = [...order, ...order.map((v) => v + nodeCount)];
    this.toPlace[discharge] = 0;
    for (const v of places)
      for (const { b, stretch } of this.leaving[v]) this.toPlace[b] = Math.max(this.toPlace[b], this.toPlace[v] + this.headOf(stretch));
    this.goal = this.toPlace[suction + nodeCount] > -Infinity ? suction + nodeCount : suction;
    this.fromPlace[this.goal] = 0;
    for (const v of places.reverse())
      for (const { a, stretch } of this.arriving[v])
        this.fromPlace[a] = Math.max(this.fromPlace[a], this.fromPlace[v] + this.headOf(stretch));
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
    return this.toPlace[this.goal];
  }

  /** Most head that a circuit through a stretch needs, m; -Infinity where none passes. */
  through(k: number): number {
    let most = -Infinity;
    for (const { a, b, stretch } of this.walksOf[k]) most = Math.max(most, this.toPlace[a] + this.headOf(stretch) + this.fromPlace[b]);
    return most;
  }

  /** To be called after `head` of a stretch has grown. */
  grown(k: number): void {
    for (const walk of this.walksOf[k]) {
      this.raise(this.toPlace, walk, this.leaving, 'b', 'a');
      this.raise(this.fromPlace, walk, this.arriving, 'a', 'b');
    }
  }

  private raise(places: Float64Array, first: Walk, onward: Walk[][], end: 'a' | 'b', start: 'a' | 'b'): void {
    const waiting = [first];
    for (let walk = waiting.pop(); walk; walk = waiting.pop()) {
      const reached = places[walk[start]] + this.headOf(walk.stretch);
      if (!(reached > places[walk[end]] + 1e-12)) continue;
      places[walk[end]] = reached;
      for (const next of onward[walk[end]]) waiting.push(next);
    }
  }

  private headOf(stretch: number): number {
    return this.stretches[stretch].head;
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
