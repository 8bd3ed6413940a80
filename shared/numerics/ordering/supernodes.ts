/** Groups of consecutive columns of L with one row structure, and the tree between them. */
export interface Supernodes {
  /** n: supernode of each vertex (places). */
  readonly of: Int32Array;
  /** Number of supernodes; children have smaller numbers than their parent. */
  readonly count: number;
  /** count: parent supernode, −1 at a root. */
  readonly parent: Int32Array;
}

/** Zeros that a merge may store, as a share of the merged panel, by its number of columns. */
const ZEROS_ALLOWED: readonly (readonly [columns: number, share: number])[] = [
  [18, 0.4],
  [48, 0.2],
  [96, 0.1],
  [Infinity, 0.04],
];

/**
 * Fundamental supernodes, then merged upwards while a panel gains few zeros: dense work on wider
 * panels is faster than sparse work on narrow ones.
 *   parent  n, elimination tree in postorder      weight  n, unknowns per vertex
 *   below   n, unknowns in the rows below each vertex (columnCounts); all in places
 * Source: Liu 1990, section 4 (supernodes); Ashcraft and Grimes 1989, The influence of relaxed
 * supernode partitions on the multifrontal method, ACM Trans. Math. Softw. 15(4), 291–309.
 */
export function supernodes(parent: Int32Array, weight: Int32Array, below: Int32Array): Supernodes {
  const n = parent.length;
  const children = new Int32Array(n);
  for (let v = 0; v < n; v++) if (parent[v]! >= 0) children[parent[v]!]! += 1;

  const fundamental = new Int32Array(n);
  const columns = new Float64Array(n);
  const rows = new Float64Array(n);
  const top = new Int32Array(n); // last vertex of each fundamental supernode
  let count = 0;
  for (let v = 0; v < n; v++) {
    const joins =
      v > 0 && parent[v - 1] === v && children[v] === 1 && below[v - 1] === below[v]! + weight[v]!;
    const s = joins ? count - 1 : count++;
    fundamental[v] = s;
    columns[s]! += weight[v]!;
    rows[s] = below[v]!;
    top[s] = v;
  }

  // Merge into the parent, children first; zeros[s] is what earlier merges have stored in s.
  const up = new Int32Array(count);
  for (let s = 0; s < count; s++) {
    const above = parent[top[s]!]!;
    up[s] = above < 0 ? -1 : fundamental[above]!;
  }
  const zeros = new Float64Array(count);
  const mergedInto = new Int32Array(count).fill(-1);
  for (let s = 0; s < count; s++) {
    const p = up[s]!;
    if (p < 0) continue;
    const width = columns[s]! + columns[p]!;
    const panel = width * (width / 2 + rows[p]!);
    const stored = zeros[s]! + zeros[p]! + columns[s]! * (columns[p]! + rows[p]! - rows[s]!);
    let share = 0;
    for (const [limit, allowed] of ZEROS_ALLOWED) {
      if (width <= limit) {
        share = allowed;
        break;
      }
    }
    if (stored > share * panel) continue;
    mergedInto[s] = p;
    columns[p] = width;
    zeros[p] = stored;
  }

  // A merged supernode takes the number of the topmost one: the order of numbers is kept.
  const number = new Int32Array(count).fill(-1);
  let merged = 0;
  for (let s = 0; s < count; s++) if (mergedInto[s]! < 0) number[s] = merged++;
  for (let s = count - 1; s >= 0; s--) {
    if (mergedInto[s]! >= 0) number[s] = number[mergedInto[s]!]!;
  }
  const treeParent = new Int32Array(merged);
  for (let s = 0; s < count; s++) {
    if (mergedInto[s]! < 0) treeParent[number[s]!] = up[s]! < 0 ? -1 : number[up[s]!]!;
  }
  const of = new Int32Array(n);
  for (let v = 0; v < n; v++) of[v] = number[fundamental[v]!]!;
  return { of, count: merged, parent: treeParent };
}
