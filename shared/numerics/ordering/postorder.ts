/**
 * Postorder of a forest: every vertex after its children, each subtree contiguous; children and
 * roots keep the order of their numbers.
 *   parent  n, −1 at a root (parents need not have the larger number)
 * Returns n vertex numbers.
 */
export function postorder(parent: Int32Array): Int32Array {
  const n = parent.length;
  const firstChild = new Int32Array(n + 1).fill(-1);
  const sibling = new Int32Array(n);
  for (let v = n - 1; v >= 0; v--) {
    const up = parent[v]! < 0 ? n : parent[v]!;
    sibling[v] = firstChild[up]!;
    firstChild[up] = v;
  }
  const result = new Int32Array(n);
  const path = new Int32Array(n);
  let count = 0;
  for (let root = firstChild[n]!; root >= 0; root = sibling[root]!) {
    let depth = 0;
    path[0] = root;
    while (depth >= 0) {
      const v = path[depth]!;
      const child = firstChild[v]!;
      if (child >= 0) {
        firstChild[v] = sibling[child]!;
        depth += 1;
        path[depth] = child;
      } else {
        result[count++] = v;
        depth -= 1;
      }
    }
  }
  return result;
}
