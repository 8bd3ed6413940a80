/** Lines, or points as lines of no length: x y z of the start, x y z of the end of each [m]. */
export type Lines = Float64Array;

/** Cells that one edge of the whole may have: three such numbers make a whole number that a double holds. */
const MOST_CELLS = 2 ** 16;
/** Cells start this part of one before the first point, so that frames on a regular grid do not lie on cell faces. */
const GRID_SHIFT = 0.37;
/**
 * Entries of cells that may be looked through: about half a second. 2,000 members in one heap stay below it, and a
 * real frame of 20,000, in which each member has a few neighbours, far below.
 */
const MOST_LOOKS = 3_000_000;

/**
 * Calls `visit(i, j)`, i < j, once for every two lines that may come within `margin` [m] of each other; most that do
 * not are left out. A uniform grid of cells about as large as a line is long: each line is entered into those that it
 * runs through. Returns whether all were visited: not where too many lie in a heap.
 */
export function visitClosePairs(
  lines: Lines,
  margin: number,
  visit: (i: number, j: number) => void,
): boolean {
  const count = lines.length / 6;
  if (count < 2) return true;
  const { least, cell } = layGrid(lines, margin);
  const along = (axis: number, value: number) =>
    Math.floor((value - least[axis]!) / cell + GRID_SHIFT);
  const entered = new Map<number, number[]>();
  const seen = new Int32Array(count).fill(-1);
  let looks = 0;
  for (let j = 0; j < count; j++) {
    const pieces = Math.max(1, Math.ceil(lengthOf(lines, j) / cell));
    for (let piece = 0; piece < pieces; piece++) {
      const first = [0, 0, 0];
      const last = [0, 0, 0];
      for (let axis = 0; axis < 3; axis++) {
        // The margin on one side of each is enough: two spans then meet wherever they are closer than it.
        const start = lines[6 * j + axis]!;
        const step = (lines[6 * j + 3 + axis]! - start) / pieces;
        const a = start + piece * step;
        first[axis] = along(axis, Math.min(a, a + step));
        last[axis] = along(axis, Math.max(a, a + step) + margin);
      }
      for (let x = first[0]!; x <= last[0]!; x++) {
        for (let y = first[1]!; y <= last[1]!; y++) {
          for (let z = first[2]!; z <= last[2]!; z++) {
            const key = (x * 2 * MOST_CELLS + y) * 2 * MOST_CELLS + z;
            const there = entered.get(key);
            if (there === undefined) {
              entered.set(key, [j]);
              continue;
            }
            looks += there.length;
            if (looks > MOST_LOOKS) return false;
            for (const i of there) {
              if (i === j || seen[i] === j) continue;
              seen[i] = j;
              visit(i, j);
            }
            if (there.at(-1) !== j) there.push(j);
          }
        }
      }
    }
  }
  return true;
}

export function lengthOf(lines: Lines, i: number): number {
  const at = 6 * i;
  return Math.hypot(
    lines[at + 3]! - lines[at]!,
    lines[at + 4]! - lines[at + 1]!,
    lines[at + 5]! - lines[at + 2]!,
  );
}

/** Longest edge of the box around all [m]. */
export function extentOf(lines: Lines): number {
  return boxOf(lines).extent;
}

function boxOf(lines: Lines): { least: number[]; extent: number } {
  const least = [Infinity, Infinity, Infinity];
  const most = [-Infinity, -Infinity, -Infinity];
  for (let k = 0; k < lines.length; k++) {
    const axis = k % 3;
    least[axis] = Math.min(least[axis]!, lines[k]!);
    most[axis] = Math.max(most[axis]!, lines[k]!);
  }
  return { least, extent: Math.max(0, ...most.map((value, axis) => value - least[axis]!)) };
}

/** Cells as long as the mean line, so that a line is in two or three of them; for points, a share of the whole. */
function layGrid(lines: Lines, margin: number): { least: number[]; cell: number } {
  const { least, extent } = boxOf(lines);
  const count = lines.length / 6;
  let total = 0;
  for (let i = 0; i < count; i++) total += lengthOf(lines, i);
  const size = total > 0 ? total / count : extent / Math.sqrt(count);
  const cell = Math.max(size, extent / MOST_CELLS, 4 * margin);
  return { least, cell: cell > 0 ? cell : 1 };
}
