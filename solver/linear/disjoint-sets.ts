/**
 * Sets that only ever grow together, over the numbers 0 to size − 1 (union by size, path halving; Tarjan 1975,
 * doi 10.1145/321879.321884).
 */
export class DisjointSets {
  private readonly parent: Int32Array;
  private readonly count: Int32Array;

  constructor(size: number) {
    this.parent = Int32Array.from({ length: size }, (_, i) => i);
    this.count = new Int32Array(size).fill(1);
  }

  /** The number that stands for the set of `member`. */
  find(member: number): number {
    let at = member;
    for (;;) {
      const up = this.parent[at] ?? at;
      if (up === at) return at;
      const next = this.parent[up] ?? up;
      this.parent[at] = next;
      at = next;
    }
  }

  /** Joins two sets; false if they were one already. */
  union(one: number, other: number): boolean {
    let large = this.find(one);
    let small = this.find(other);
    if (large === small) return false;
    if ((this.count[large] ?? 1) < (this.count[small] ?? 1)) [large, small] = [small, large];
    this.parent[small] = large;
    this.count[large] = (this.count[large] ?? 1) + (this.count[small] ?? 1);
    return true;
  }
}
