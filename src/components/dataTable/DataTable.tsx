import {
  createSortedRowModel,
  rowSortingFeature,
  sortFn_alphanumeric,
  sortFn_text,
  tableFeatures,
  useTable,
  type ColumnDef,
} from '@tanstack/react-table';
import { useVirtualizer } from '@tanstack/react-virtual';
import { clsx } from 'clsx';
import { useMemo, useRef, type ReactNode } from 'react';
import { TableHead } from './TableHead.tsx';
import { useGridFocus } from './useGridFocus.ts';

export interface DataColumn<Row> {
  readonly id: string;
  readonly header: string;
  /** Stands after the header, quieter: "Hz". */
  readonly unit?: string;
  readonly cell: (row: Row) => ReactNode;
  /** Makes the column sortable; rows without a value come last. */
  readonly sortValue?: (row: Row) => string | number | null;
  /** Figures: set in tabular type and to the right. */
  readonly numeric?: boolean;
  /** The cell that names its row. */
  readonly rowHeader?: boolean;
  readonly className?: string;
}

interface DataTableProps<Row> {
  /** Names the table; shown above it unless `captionHidden`. */
  caption: string;
  captionHidden?: boolean;
  rows: readonly Row[];
  columns: readonly DataColumn<Row>[];
  rowKey: (row: Row) => string;
  initialSort?: { id: string; desc: boolean };
  selectedKey?: string | null;
  /** A click in the row, or Enter on a cell that holds no control of its own. */
  onRowPress?: (row: Row) => void;
  /** Stands in place of rows. */
  empty?: ReactNode;
  /** Limits the height, so that the table scrolls inside ("40vh"); long tables need it. */
  maxHeight?: string;
  className?: string;
}

const features = tableFeatures({
  rowSortingFeature,
  sortedRowModel: createSortedRowModel(),
  sortFns: { alphanumeric: sortFn_alphanumeric, text: sortFn_text },
});
export type DataTableFeatures = typeof features;

/** Above this only the rows in view are drawn. */
const VIRTUAL_ABOVE = 100;
const ROW_PX = 37;

/** A quiet table: sorting by its heads, arrows between its cells, thousands of rows. */
export function DataTable<Row extends object>({
  caption,
  captionHidden = false,
  rows,
  columns,
  rowKey,
  initialSort,
  selectedKey,
  onRowPress,
  empty,
  maxHeight,
  className,
}: DataTableProps<Row>) {
  const frame = useRef<HTMLDivElement>(null);
  const body = useRef<HTMLTableSectionElement>(null);
  const definitions = useMemo(
    () =>
      columns.map((column): ColumnDef<DataTableFeatures, Row> => ({
        id: column.id,
        accessorFn: (row) => column.sortValue?.(row) ?? undefined,
        header: column.header,
        enableSorting: column.sortValue !== undefined,
        sortUndefined: 'last',
      })),
    [columns],
  );
  const table = useTable({
    features,
    columns: definitions,
    data: rows,
    getRowId: rowKey,
    enableSortingRemoval: false,
    ...(initialSort ? { initialState: { sorting: [initialSort] } } : {}),
  });
  const sorted = table.getRowModel().rows;
  const virtual = sorted.length > VIRTUAL_ABOVE;
  const virtualizer = useVirtualizer({
    count: sorted.length,
    enabled: virtual,
    getScrollElement: () => frame.current,
    estimateSize: () => ROW_PX,
    getItemKey: (index) => sorted[index]?.id ?? index,
    overscan: 8,
  });
  const press = (row: Row | undefined) => {
    if (row) onRowPress?.(row);
  };
  const grid = useGridFocus(
    body,
    { rows: sorted.length, columns: columns.length },
    (row) => {
      if (virtual) virtualizer.scrollToIndex(row);
    },
    (row) => press(sorted[row]?.original),
  );

  const items = virtual ? virtualizer.getVirtualItems() : [];
  const shown = virtual ? items.map((item) => item.index) : sorted.map((_row, index) => index);
  const above = items[0]?.start ?? 0;
  const below = virtual ? virtualizer.getTotalSize() - (items.at(-1)?.end ?? 0) : 0;

  return (
    <div
      ref={frame}
      className={clsx('relative overflow-auto', className)}
      style={{ maxHeight: maxHeight ?? (virtual ? '70vh' : undefined) }}
    >
      <table
        role="grid"
        aria-rowcount={sorted.length + 1}
        aria-colcount={columns.length}
        className="w-full border-collapse text-left"
      >
        <caption className={captionHidden ? 'sr-only' : 'pb-2 text-left font-semibold'}>
          {caption}
        </caption>
        <TableHead table={table} columns={columns} />
        <tbody ref={body} onKeyDown={grid.onKeyDown} onFocus={grid.onFocus}>
          {above > 0 && <tr aria-hidden="true" style={{ height: above }} />}
          {shown.map((index) => {
            const row = sorted[index];
            if (!row) return null;
            const selected = selectedKey === row.id;
            return (
              <tr
                key={row.id}
                aria-rowindex={index + 2}
                {...(selectedKey === undefined ? {} : { 'aria-selected': selected })}
                onClick={() => press(row.original)}
                className={clsx(
                  'border-b border-rule',
                  onRowPress && 'cursor-pointer hover:bg-ground',
                  selected && 'bg-ground shadow-[inset_3px_0_0_var(--ink)]',
                )}
              >
                {columns.map((column, place) => {
                  const Cell = column.rowHeader ? 'th' : 'td';
                  const active = grid.active.row === index && grid.active.column === place;
                  return (
                    <Cell
                      key={column.id}
                      {...(column.rowHeader ? { scope: 'row' as const } : { role: 'gridcell' })}
                      data-row={index}
                      data-column={place}
                      tabIndex={active ? 0 : -1}
                      className={clsx(
                        'px-3 py-1.5 align-top font-normal first:pl-1 last:pr-1 focus-visible:outline-offset-[-2px]',
                        column.numeric && 'num text-right whitespace-nowrap',
                        column.className,
                      )}
                    >
                      {column.cell(row.original)}
                    </Cell>
                  );
                })}
              </tr>
            );
          })}
          {below > 0 && <tr aria-hidden="true" style={{ height: below }} />}
        </tbody>
      </table>
      {sorted.length === 0 && empty !== undefined && <div className="py-4">{empty}</div>}
    </div>
  );
}
