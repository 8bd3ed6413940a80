/** Columns padded to their widest cell: the last to the left, the others to the right. */
export function table(rows: readonly (readonly string[])[]): string[] {
  const widths: number[] = [];
  for (const row of rows) {
    row.forEach((cell, column) => {
      widths[column] = Math.max(widths[column] ?? 0, cell.length);
    });
  }
  return rows.map((row) =>
    row
      .map((cell, column) =>
        column === row.length - 1 ? cell : cell.padStart(widths[column] ?? 0),
      )
      .join('  '),
  );
}

/** A number with at most so many significant digits. */
export function significant(value: number, digits: number): string {
  return value === 0 ? '0' : String(Number(value.toPrecision(digits)));
}
