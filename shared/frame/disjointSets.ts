/** Things 0 … count − 1 in sets that grow together; the least of a set stands for it. */
export class DisjointSets {
  private readonly leader: Int32Array;

  constructor(count: number) {
    this.leader = Int32Array.from({ length: count }, (_, i) => i);
  }

  /** The least thing of the set that holds `i`. */
  find(i: number): number {
    let root = i;
    while (this.leader[root] !== root) root = this.leader[root]!;
    this.leader[i] = root;
    return root;
  }

  join(i: number, j: number): void {
    const a = this.find(i);
    const b = this.find(j);
    this.leader[Math.max(a, b)] = Math.min(a, b);
  }
}
