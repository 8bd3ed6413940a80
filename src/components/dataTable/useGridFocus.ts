import {
  useEffect,
  useRef,
  useState,
  type FocusEvent,
  type KeyboardEvent,
  type RefObject,
} from 'react';
import { cellMove, type CellPlace } from './cellMove.ts';

const PAGE_ROWS = 10;
const WIDGET = 'a[href], button:not([disabled]), input, select, textarea';
const TYPED_INTO = 'input:not([type="checkbox"]), select, textarea';

interface GridFocus {
  /** The cell that Tab reaches. */
  active: CellPlace;
  onKeyDown: (event: KeyboardEvent<HTMLElement>) => void;
  onFocus: (event: FocusEvent<HTMLElement>) => void;
}

/**
 * One cell of a grid is the tab stop; keys move it. In a cell with one link or button the focus goes to that;
 * into an input Enter or F2 leads and Escape leads back, so that arrows stay free for the text.
 */
export function useGridFocus(
  body: RefObject<HTMLElement | null>,
  size: { rows: number; columns: number },
  reveal: (row: number) => void,
  onEnter?: (row: number) => void,
): GridFocus {
  const [place, setPlace] = useState<CellPlace>({ row: 0, column: 0 });
  const [wanted, setWanted] = useState<CellPlace | null>(null);
  const revealRow = useRef(reveal);
  useEffect(() => {
    revealRow.current = reveal;
  });

  // A row that scrolls into view is drawn a frame later: the focus waits for it.
  useEffect(() => {
    if (!wanted) return;
    revealRow.current(wanted.row);
    const frame = requestAnimationFrame(() => {
      const cell = body.current?.querySelector<HTMLElement>(
        `[data-row="${wanted.row}"][data-column="${wanted.column}"]`,
      );
      if (!cell) return;
      const widgets = cell.querySelectorAll<HTMLElement>(WIDGET);
      const only = widgets.length === 1 ? widgets[0] : undefined;
      (only && !only.matches(TYPED_INTO) ? only : cell).focus();
    });
    return () => cancelAnimationFrame(frame);
  }, [wanted, body]);

  const active: CellPlace = {
    row: Math.max(0, Math.min(place.row, size.rows - 1)),
    column: Math.max(0, Math.min(place.column, size.columns - 1)),
  };

  const onKeyDown = (event: KeyboardEvent<HTMLElement>) => {
    const target = event.target as HTMLElement;
    const cell = target.closest<HTMLElement>('[data-row]');
    if (!cell || event.altKey) return;
    if (target.matches(TYPED_INTO)) {
      if (event.key === 'Escape') cell.focus();
      return;
    }
    if (target === cell && (event.key === 'Enter' || event.key === 'F2')) {
      const widget = cell.querySelector<HTMLElement>(WIDGET);
      event.preventDefault();
      if (widget) widget.focus();
      else onEnter?.(placeOf(cell).row);
      return;
    }
    const next = cellMove(event.key, event.ctrlKey || event.metaKey, placeOf(cell), {
      ...size,
      page: PAGE_ROWS,
    });
    if (!next) return;
    event.preventDefault();
    setPlace(next);
    setWanted(next);
  };

  const onFocus = (event: FocusEvent<HTMLElement>) => {
    const cell = event.target.closest<HTMLElement>('[data-row]');
    if (cell) setPlace(placeOf(cell));
  };

  return { active, onKeyDown, onFocus };
}

const placeOf = (cell: HTMLElement): CellPlace => ({
  row: Number(cell.dataset['row']),
  column: Number(cell.dataset['column']),
});
