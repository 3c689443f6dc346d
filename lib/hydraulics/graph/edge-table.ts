/** Finds the edge between two nodes: open addressing over typed arrays, because a Map keyed by pairs is several times slower here. */
export class EdgeTable {
  private low: Int32Array;
  private high: Int32Array;
  private edge: Int32Array;
  private held = 0;

  constructor(expected: number) {
    const size = 2 ** Math.ceil(Math.log2(Math.max(16, 4 * expected)));
    this.low = new Int32Array(size).fill(-1);
    this.high = new Int32Array(size);
    this.edge = new Int32Array(size);
  }

  /** Edge last set between u and v, or -1. */
  get(u: number, v: number): number {
    const at = this.slot(Math.min(u, v), Math.max(u, v));
    return this.low[at] < 0 ? -1 : this.edge[at];
  }

  set(u: number, v: number, edge: number): void {
    if (2 * this.held > this.low.length) this.grow();
    const a = Math.min(u, v);
    const b = Math.max(u, v);
    const at = this.slot(a, b);
    if (this.low[at] < 0) this.held++;
    this.low[at] = a;
    this.high[at] = b;
    this.edge[at] = edge;
  }

  private slot(a: number, b: number): number {
    const mask = this.low.length - 1;
    let at = (Math.imul(a, 0x9e3779b1) ^ Math.imul(b, 0x85ebca6b)) & mask;
    while (this.low[at] >= 0 && (this.low[at] !== a || this.high[at] !== b)) at = (at + 1) & mask;
    return at;
  }

  private grow(): void {
    const { low, high, edge } = this;
    this.low = new Int32Array(2 * low.length).fill(-1);
    this.high = new Int32Array(2 * low.length);
    this.edge = new Int32Array(2 * low.length);
    this.held = 0;
    for (let at = 0; at < low.length; at++) if (low[at] >= 0) this.set(low[at], high[at], edge[at]);
  }
}
