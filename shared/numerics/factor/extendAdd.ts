/**
 * Adds a child's update matrix into its parent's front (Duff and Reid 1983: extend-add).
 *   stack      holds the child's lower triangle, row by row, at `from` (order `size`), and the
 *              parent's at `to`
 *   values     the parent's panel at `panel`, `columns` values a row
 *   relative   at `index`: for each row of the child, ascending, its index in the parent's front
 */
export function extendAdd(
  stack: Float64Array,
  from: number,
  size: number,
  to: number,
  values: Float64Array,
  panel: number,
  columns: number,
  relative: Int32Array,
  index: number,
): void {
  let split = 0;
  while (split < size && relative[index + split]! < columns) split += 1;
  let source = from;
  for (let i = 0; i < size; i++) {
    const row = relative[index + i]!;
    const inPanel = i < split ? i + 1 : split;
    const panelRow = panel + row * columns;
    for (let j = 0; j < inPanel; j++) {
      values[panelRow + relative[index + j]!]! += stack[source++]!;
    }
    const r = row - columns;
    const stackRow = to + ((r * (r + 1)) >> 1) - columns;
    for (let j = split; j <= i; j++) {
      stack[stackRow + relative[index + j]!]! += stack[source++]!;
    }
  }
}
