export interface CellPlace {
  readonly row: number;
  readonly column: number;
}

interface GridSize {
  readonly rows: number;
  readonly columns: number;
  /** Rows that Page Up and Page Down pass over. */
  readonly page: number;
}

/**
 * Where a key leads from one cell of a grid, after the grid pattern of the WAI-ARIA Authoring Practices:
 * arrows, Home and End in the row, with Ctrl in the table, Page Up and Page Down. `null`: not a moving key.
 */
export function cellMove(
  key: string,
  withControl: boolean,
  at: CellPlace,
  size: GridSize,
): CellPlace | null {
  const lastRow = size.rows - 1;
  const lastColumn = size.columns - 1;
  const to = (row: number, column: number): CellPlace => ({
    row: Math.max(0, Math.min(lastRow, row)),
    column: Math.max(0, Math.min(lastColumn, column)),
  });
  switch (key) {
    case 'ArrowUp':
      return to(withControl ? 0 : at.row - 1, at.column);
    case 'ArrowDown':
      return to(withControl ? lastRow : at.row + 1, at.column);
    case 'ArrowLeft':
      return to(at.row, withControl ? 0 : at.column - 1);
    case 'ArrowRight':
      return to(at.row, withControl ? lastColumn : at.column + 1);
    case 'Home':
      return to(withControl ? 0 : at.row, 0);
    case 'End':
      return to(withControl ? lastRow : at.row, lastColumn);
    case 'PageUp':
      return to(at.row - size.page, at.column);
    case 'PageDown':
      return to(at.row + size.page, at.column);
    default:
      return null;
  }
}
