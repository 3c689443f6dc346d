/** Whole numbers appended one by one to a typed array that doubles when full: a plain array of a hundred thousand costs far more to make and to collect. */
export class GrowingList {
  private held: Int32Array;
  length = 0;

  constructor(expected = 64) {
    this.held = new Int32Array(expected);
  }

  push(value: number): void {
    if (this.length === this.held.length) {
      const larger = new Int32Array(2 * this.length + 16);
      larger.set(this.held);
      this.held = larger;
    }
    this.held[this.length++] = value;
  }

  at(index: number): number {
    return this.held[index];
  }

  toArray(): Int32Array {
    return this.held.slice(0, this.length);
  }
}
