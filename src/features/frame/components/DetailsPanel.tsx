import { X } from 'lucide-react';
import type { RefObject } from 'react';
import { Button } from '#src/components/Button.tsx';
import { Select } from '#src/components/Select.tsx';
import { useFrameEditing } from '../state/FrameEditing.ts';
import { labelOf, nounOf } from '../state/lists.ts';
import { describeRemoval } from '../state/removeEntry.ts';
import type { Chosen } from '../state/problems.ts';
import { EntryForm } from './EntryForm.tsx';

/** The details of what is chosen, open beside it; from the lower edge on small screens. */
export function DetailsPanel({
  panel,
  beside,
}: {
  panel: RefObject<HTMLElement | null>;
  /** The thing is in the view, which keeps the panel beside it; otherwise it stands in the corner. */
  beside: boolean;
}) {
  const { frame, chosen, choose, readOnly, remove } = useFrameEditing();
  const [only] = chosen;
  if (!only) return null;
  const single = chosen.length === 1;
  const title = single ? labelOf(frame, only.list, only.id) : `${chosen.length} things`;
  const close = () => choose([]);
  return (
    <section
      ref={panel}
      aria-label={`Details: ${title}`}
      className={`z-20 flex flex-col border-ink bg-sheet max-md:fixed max-md:inset-x-0 max-md:bottom-0 max-md:max-h-[70dvh] max-md:transform-none! max-md:border-t md:absolute md:max-h-[calc(100%-16px)] md:w-[23rem] md:border ${beside ? 'md:top-0 md:left-0' : 'md:top-2 md:left-2'}`}
      onKeyDown={(event) => {
        if (event.key === 'Escape' && !event.defaultPrevented) close();
      }}
    >
      <header className="flex items-center justify-between gap-2 border-b border-rule py-1 pr-1 pl-3">
        <h2 className="min-w-0 truncate text-base">
          {single && <span className="font-normal text-ink-soft">{nounOf(only.list)} </span>}
          {title.replace(/^support at /, 'at ')}
        </h2>
        <button
          type="button"
          aria-label="Close details"
          className="flex size-8 shrink-0 cursor-pointer items-center justify-center border border-transparent hover:border-rule"
          onClick={close}
        >
          <X aria-hidden="true" className="size-4" />
        </button>
      </header>
      <div className="min-h-0 overflow-y-auto px-3 py-2">
        {single ? <EntryForm key={`${only.list} ${only.id}`} {...only} /> : <SeveralMembers />}
      </div>
      {!readOnly && (
        <footer className="flex items-center justify-between gap-2 border-t border-rule px-3 py-1">
          <span className="text-sm text-ink-soft">{single && removalWords(frame, only)}</span>
          <Button look="quiet" className="text-signal-text" onClick={() => remove(chosen)}>
            Remove
          </Button>
        </footer>
      )}
    </section>
  );
}

function removalWords(frame: Parameters<typeof describeRemoval>[0], { list, id }: Chosen): string {
  if (list !== 'nodes') return '';
  const along = describeRemoval(frame, list, id);
  return along === '' ? '' : `with it: ${along}`;
}

/** What can be done to several members at once. */
function SeveralMembers() {
  const { frame, chosen, run, readOnly } = useFrameEditing();
  const ids = new Set(chosen.filter(({ list }) => list === 'members').map(({ id }) => id));
  const members = frame.members.filter(({ id }) => ids.has(id));
  if (members.length === 0)
    return <p className="text-ink-soft">Choose members to change them together.</p>;
  const set = (field: 'section' | 'material', value: string) =>
    run(
      {
        kind: 'set',
        fields: {
          members: frame.members.map((member) =>
            ids.has(member.id) ? { ...member, [field]: value } : member,
          ),
        },
      },
      `give ${members.length} members a ${field}`,
    );
  const shared = (field: 'section' | 'material') => {
    const values = new Set(members.map((member) => member[field]));
    return values.size === 1 ? (members[0]?.[field] ?? '') : '';
  };
  return (
    <div className="space-y-2">
      <p className="text-ink-soft">{members.map(({ id, name }) => name ?? id).join(', ')}</p>
      {(['section', 'material'] as const).map((field) => (
        <Select
          key={field}
          label={field === 'section' ? 'Section of all' : 'Material of all'}
          disabled={readOnly}
          value={shared(field)}
          options={[
            ...(shared(field) === '' ? [{ value: '', label: 'different', disabled: true }] : []),
            ...frame[field === 'section' ? 'sections' : 'materials'].map(({ id, name }) => ({
              value: id,
              label: name,
            })),
          ]}
          onValueChange={(value) => set(field, value)}
        />
      ))}
    </div>
  );
}
