import { render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { cellMove } from '#src/components/dataTable/cellMove.ts';
import { DataTable, type DataColumn } from '#src/components/dataTable/DataTable.tsx';

interface Row {
  id: string;
  length: number | null;
}

const ROWS: Row[] = [
  { id: 'rail', length: 1.2 },
  { id: 'leg', length: 0.8 },
  { id: 'brace', length: null },
];

const COLUMNS: DataColumn<Row>[] = [
  { id: 'id', header: 'Name', rowHeader: true, cell: (row) => row.id, sortValue: (row) => row.id },
  {
    id: 'length',
    header: 'Length',
    unit: 'm',
    numeric: true,
    cell: (row) => row.length ?? '–',
    sortValue: (row) => row.length,
  },
  { id: 'edit', header: 'Edit', cell: (row) => <button type="button">Edit {row.id}</button> },
];

const draw = (onRowPress?: (row: Row) => void) =>
  render(
    <DataTable
      caption="Members"
      rows={ROWS}
      columns={COLUMNS}
      rowKey={(row) => row.id}
      {...(onRowPress ? { onRowPress } : {})}
    />,
  );

const names = () => screen.getAllByRole('rowheader').map((cell) => cell.textContent);

describe('DataTable', () => {
  it('is named by its caption and sorts by a head, rows without a value last', async () => {
    draw();
    expect(screen.getByRole('grid', { name: 'Members' })).toBeInTheDocument();
    const head = screen.getByRole('columnheader', { name: /Length/ });
    expect(head).toHaveAttribute('aria-sort', 'none');
    const button = within(head).getByRole('button');
    await userEvent.click(button);
    const first = head.getAttribute('aria-sort');
    await userEvent.click(button);
    const second = head.getAttribute('aria-sort');
    expect([first, second].sort()).toEqual(['ascending', 'descending']);
    if (second === 'descending') await userEvent.click(button);
    expect(head).toHaveAttribute('aria-sort', 'ascending');
    expect(names()).toEqual(['leg', 'rail', 'brace']);
    await userEvent.click(button);
    expect(names()).toEqual(['rail', 'leg', 'brace']);
  });

  it('moves between cells by arrows, Home, End; into a lone button at once', async () => {
    draw();
    const cell = (text: string) => screen.getByText(text);
    const start = cell('rail');
    start.focus();
    await userEvent.keyboard('{ArrowRight}');
    await waitFor(() => expect(cell('1.2')).toHaveFocus());
    await userEvent.keyboard('{ArrowDown}');
    await waitFor(() => expect(cell('0.8')).toHaveFocus());
    await userEvent.keyboard('{End}');
    await waitFor(() => expect(screen.getByRole('button', { name: 'Edit leg' })).toHaveFocus());
    await userEvent.keyboard('{Control>}{Home}{/Control}');
    await waitFor(() => expect(cell('rail')).toHaveFocus());
    await userEvent.keyboard('{ArrowUp}{ArrowLeft}');
    await waitFor(() => expect(cell('rail')).toHaveFocus());
    expect(cell('rail')).toHaveAttribute('tabindex', '0');
    expect(cell('leg')).toHaveAttribute('tabindex', '-1');
  });

  it('opens a row by Enter and by a click', async () => {
    const onRowPress = vi.fn();
    draw(onRowPress);
    screen.getByText('leg').focus();
    await userEvent.keyboard('{Enter}');
    expect(onRowPress).toHaveBeenLastCalledWith(ROWS[1]);
    await userEvent.click(screen.getByText('1.2'));
    expect(onRowPress).toHaveBeenLastCalledWith(ROWS[0]);
  });

  it('draws only a part of thousands of rows and tells how many there are', () => {
    // The test's DOM lays nothing out: give the scrolling frame a height.
    vi.spyOn(HTMLElement.prototype, 'clientHeight', 'get').mockReturnValue(600);
    const many = Array.from({ length: 5000 }, (_, index) => ({ id: `member ${index}`, length: 1 }));
    render(<DataTable caption="Members" rows={many} columns={COLUMNS} rowKey={(row) => row.id} />);
    expect(screen.getByRole('grid')).toHaveAttribute('aria-rowcount', '5001');
    const drawn = screen.getAllByRole('rowheader').length;
    expect(drawn).toBeGreaterThan(600 / 40);
    expect(drawn).toBeLessThan(100);
    vi.restoreAllMocks();
  });
});

describe('cellMove', () => {
  const size = { rows: 30, columns: 4, page: 10 };
  it.each([
    ['ArrowDown', false, { row: 29, column: 0 }, { row: 29, column: 0 }],
    ['PageDown', false, { row: 5, column: 2 }, { row: 15, column: 2 }],
    ['PageUp', false, { row: 5, column: 2 }, { row: 0, column: 2 }],
    ['End', true, { row: 5, column: 2 }, { row: 29, column: 3 }],
    ['ArrowRight', true, { row: 5, column: 0 }, { row: 5, column: 3 }],
  ] as const)('%s (control: %s) from %o leads to %o', (key, control, from, to) => {
    expect(cellMove(key, control, from, size)).toEqual(to);
  });
  it('leaves other keys alone', () => {
    expect(cellMove('a', false, { row: 0, column: 0 }, size)).toBeNull();
  });
});
