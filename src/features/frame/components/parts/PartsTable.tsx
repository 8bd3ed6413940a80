import { useMemo } from 'react';
import type { DocumentList } from '#shared/frame/documentDiff.ts';
import { Button } from '#src/components/Button.tsx';
import { DataTable } from '#src/components/dataTable/DataTable.tsx';
import { useUnits } from '#src/hooks/useUnits.ts';
import { useFrameEditing } from '../../state/FrameEditing.ts';
import { idOf, LIST_TITLES, nounOf, type EntryOf } from '../../state/lists.ts';
import { COLUMNS } from './columns.tsx';

/** One list of the document as a table; a row that is pressed opens its details. */
export function PartsTable<List extends DocumentList>({ list }: { list: List }) {
  const { frame, readOnly, run, chosen, choose, add } = useFrameEditing();
  const units = useUnits();
  const columns = useMemo(
    () => COLUMNS[list]({ frame, readOnly, run }, units),
    [list, frame, readOnly, run, units],
  );
  const rows: readonly EntryOf<List>[] = frame[list];
  const only = chosen.length === 1 && chosen[0]?.list === list ? chosen[0].id : null;
  const title = LIST_TITLES.find((one) => one.list === list)?.title ?? list;
  return (
    <div className="flex h-full min-h-0 flex-col">
      <DataTable
        caption={title}
        captionHidden
        rows={rows}
        columns={columns}
        rowKey={(entry) => idOf(list, entry)}
        selectedKey={only}
        onRowPress={(entry) => choose([{ list, id: idOf(list, entry) }])}
        maxHeight="100%"
        className="min-h-0 flex-1"
        empty={<p className="px-1 text-ink-soft">{EMPTY[list]}</p>}
      />
      {!readOnly && (
        <div className="border-t border-rule py-1">
          <Button look="quiet" onClick={() => add(list)}>
            Add {nounOf(list)}
          </Button>
        </div>
      )}
    </div>
  );
}

const EMPTY: Record<DocumentList, string> = {
  nodes: 'No nodes yet. Members run from node to node: add two to begin.',
  members: 'No members yet. “Add member” above the view joins two nodes.',
  sections: 'No sections yet. The first member brings one along.',
  materials: 'No materials yet. The first member brings one along.',
  supports: 'Nothing holds the frame yet. Add a support under each foot.',
  springs: 'No springs. They tie two nodes by stated stiffness.',
  rigidLinks: 'No rigid links. They make nodes move as one, like motor feet on a casting.',
  masses: 'No masses yet. What stands on the frame: motor, tank, spindle?',
  states:
    'No operating states: the frame is solved as drawn. Add one for tank full, carriage left …',
};
