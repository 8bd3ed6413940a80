/** Doubly linked lists of vertices by degree, with the vertex of least degree at hand. */
export class DegreeLists {
  readonly #head: Int32Array;
  readonly #next: Int32Array;
  readonly #previous: Int32Array;
  #minimum: number;

  /** n vertices with degrees 0 … maxDegree. */
  constructor(n: number, maxDegree: number) {
    this.#head = new Int32Array(maxDegree + 1).fill(-1);
    this.#next = new Int32Array(n);
    this.#previous = new Int32Array(n);
    this.#minimum = maxDegree;
  }

  insert(vertex: number, degree: number): void {
    const first = this.#head[degree]!;
    this.#next[vertex] = first;
    this.#previous[vertex] = -1;
    if (first >= 0) this.#previous[first] = vertex;
    this.#head[degree] = vertex;
    if (degree < this.#minimum) this.#minimum = degree;
  }

  /** Takes out a vertex that was inserted with this degree. */
  remove(vertex: number, degree: number): void {
    const before = this.#previous[vertex]!;
    const after = this.#next[vertex]!;
    if (before >= 0) this.#next[before] = after;
    else this.#head[degree] = after;
    if (after >= 0) this.#previous[after] = before;
  }

  /** Takes out and returns a vertex of least degree; there must be one. */
  removeMinimum(): number {
    while (this.#head[this.#minimum]! < 0) this.#minimum += 1;
    const vertex = this.#head[this.#minimum]!;
    this.remove(vertex, this.#minimum);
    return vertex;
  }
}
