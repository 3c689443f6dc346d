/** Reproducible random numbers: mulberry32 (T. Ettinger, public domain), uniform in [0, 1), and normal by Box and Muller 1958. */
export class SeededRandom {
  private state: number;

  constructor(seed: number) {
    this.state = seed >>> 0;
  }

  uniform(): number {
    this.state = (this.state + 0x6d2b79f5) >>> 0;
    let t = this.state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  }

  normal(): number {
    return Math.sqrt(-2 * Math.log(1 - this.uniform())) * Math.cos(2 * Math.PI * this.uniform());
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.uniform();
  }

  /** Takes a random one out of a list. */
  take<T>(from: T[]): T {
    return from.splice(Math.floor(this.uniform() * from.length), 1)[0];
  }
}
