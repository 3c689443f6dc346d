/** Numbers 0 … size - 1, each under a degree, in linked lists: the least is found and a degree changed without searching. */
export class DegreeBuckets {
  private readonly first: Int32Array;
  private readonly next: Int32Array;
  private readonly previous: Int32Array;
  private readonly degree: Int32Array;
  private least = 0;

  constructor(size: number) {
    this.first = new Int32Array(size + 1).fill(-1);
    this.next = new Int32Array(size);
    this.previous = new Int32Array(size);
    this.degree = new Int32Array(size);
  }

  add(i: number, degree: number): void {
    const head = this.first[degree];
    this.degree[i] = degree;
    this.next[i] = head;
    this.previous[i] = -1;
    if (head >= 0) this.previous[head] = i;
    this.first[degree] = i;
    if (degree < this.least) this.least = degree;
  }

  move(i: number, degree: number): void {
    if (this.degree[i] === degree) return;
    this.remove(i);
    this.add(i, degree);
  }

  /** Takes out one of the least degree; there must be one. */
  takeLeast(): number {
    while (this.first[this.least] < 0) this.least++;
    const i = this.first[this.least];
    this.remove(i);
    return i;
  }

  private remove(i: number): void {
    const { next, previous, first, degree } = this;
    if (previous[i] >= 0) next[previous[i]] = next[i];
    else first[degree[i]] = next[i];
    if (next[i] >= 0) previous[next[i]] = previous[i];
  }
}
