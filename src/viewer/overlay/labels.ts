import type { Pen, Spot } from './pen.ts';

export interface Label {
  readonly text: string;
  readonly at: Spot;
  readonly colour: string;
  readonly strong?: boolean;
}

const FONT_PX = 12;
/** Labels are found again by the cell they cover; a cell taken stays taken. */
const CELL_PX = 6;
const OFFSET = { x: 7, y: -8 };

/** Writes labels in order of importance; one that would cover an earlier one is left out. */
export function drawLabels(pen: Pen, labels: readonly Label[], ground: string): void {
  const taken = new Set<string>();
  pen.textAlign = 'left';
  pen.textBaseline = 'middle';
  pen.lineJoin = 'round';
  for (const label of labels) {
    pen.font = `${label.strong ? 600 : 450} ${FONT_PX}px 'Commissioner Variable', sans-serif`;
    const x = label.at.x + OFFSET.x;
    const y = label.at.y + OFFSET.y;
    const cells = cellsOf(x, y, pen.measureText(label.text).width);
    if (!label.strong && cells.some((cell) => taken.has(cell))) continue;
    for (const cell of cells) taken.add(cell);
    pen.strokeStyle = ground;
    pen.lineWidth = 3.5;
    pen.strokeText(label.text, x, y);
    pen.fillStyle = label.colour;
    pen.fillText(label.text, x, y);
  }
}

function cellsOf(x: number, y: number, width: number): string[] {
  const cells: string[] = [];
  for (let row = -1; row <= 1; row += 1) {
    const cellRow = Math.floor((y + (row * FONT_PX) / 2) / CELL_PX);
    for (let px = x; px <= x + width + CELL_PX; px += CELL_PX) {
      cells.push(`${Math.floor(px / CELL_PX)},${cellRow}`);
    }
  }
  return cells;
}
