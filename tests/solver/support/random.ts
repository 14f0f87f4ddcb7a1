/** A small seeded generator (mulberry32, public domain), so that a random test is the same test every time. */
export class Random {
  constructor(private state: number) {}

  /** At least 0, below 1. */
  next(): number {
    this.state = (this.state + 0x6d2b79f5) | 0;
    let t = Math.imul(this.state ^ (this.state >>> 15), 1 | this.state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.next();
  }

  /** A whole number from low to high, both included. */
  whole(low: number, high: number): number {
    return low + Math.floor((high - low + 1) * this.next());
  }

  pick<T>(from: readonly T[]): T {
    const chosen = from[this.whole(0, from.length - 1)];
    if (chosen === undefined) throw new Error('nothing to pick from');
    return chosen;
  }
}
