/** Things that are put together step by step (union–find with path halving; R. E. Tarjan, J. ACM 22, 1975). */
export class Clusters {
  private readonly parents: Uint32Array;

  constructor(count: number) {
    this.parents = Uint32Array.from({ length: count }, (_, i) => i);
  }

  /** The smallest member of the cluster of `item`. */
  root(item: number): number {
    let at = item;
    for (let parent = this.parents[at]!; parent !== at; parent = this.parents[at]!) {
      this.parents[at] = this.parents[parent]!;
      at = this.parents[at]!;
    }
    return at;
  }

  join(a: number, b: number): void {
    const [u, v] = [this.root(a), this.root(b)];
    if (u < v) this.parents[v] = u;
    else this.parents[u] = v;
  }
}
