import type { ReactTable } from '@tanstack/react-table';
import { clsx } from 'clsx';
import type { DataColumn, DataTableFeatures } from './DataTable.tsx';

interface TableHeadProps<Row extends object> {
  table: ReactTable<DataTableFeatures, Row>;
  columns: readonly DataColumn<Row>[];
}

const SORTED = { asc: 'ascending', desc: 'descending' } as const;

/** The heads of a table; one that sorts is a button, and says which way it sorts. */
export function TableHead<Row extends object>({ table, columns }: TableHeadProps<Row>) {
  return (
    <thead className="sticky top-0 z-10 bg-ground">
      <tr aria-rowindex={1}>
        {columns.map((column) => {
          const model = table.getColumn(column.id);
          const sorts = model?.getCanSort() ?? false;
          const sorted = model?.getIsSorted() ?? false;
          const name = (
            <>
              {column.header}
              {column.unit !== undefined && (
                <span className="ml-1 text-ink-soft">{column.unit}</span>
              )}
            </>
          );
          return (
            <th
              key={column.id}
              scope="col"
              {...(sorts ? { 'aria-sort': sorted ? SORTED[sorted] : ('none' as const) } : {})}
              className={clsx(
                'border-b border-pencil px-3 py-1 text-sm font-medium whitespace-nowrap first:pl-1 last:pr-1',
                column.numeric && 'text-right',
              )}
            >
              {sorts ? (
                <button
                  type="button"
                  onClick={() => model?.toggleSorting()}
                  className="inline-flex min-h-6 cursor-pointer items-center gap-1 hover:underline"
                >
                  {name}
                  <span aria-hidden="true" className={clsx('w-3', !sorted && 'text-pencil')}>
                    {sorted === 'asc' ? '↑' : sorted === 'desc' ? '↓' : '↕'}
                  </span>
                </button>
              ) : (
                name
              )}
            </th>
          );
        })}
      </tr>
    </thead>
  );
}
