import { idOf, findEntry, labelOf, type EntryOf } from '../state/lists.ts';
import type { DocumentList } from '#shared/frame/documentDiff.ts';
import { useFrameEditing } from '../state/FrameEditing.ts';
import { fieldProblems, type Chosen } from '../state/problems.ts';
import type { FrameCommand } from '../state/command.ts';
import type { EntryFormProps } from './forms/EntryFormProps.ts';
import { MassForm } from './forms/MassForm.tsx';
import { MaterialForm } from './forms/MaterialForm.tsx';
import { MemberForm } from './forms/MemberForm.tsx';
import { NodeForm } from './forms/NodeForm.tsx';
import { RigidLinkForm } from './forms/RigidLinkForm.tsx';
import { SectionForm } from './forms/SectionForm.tsx';
import { SpringForm } from './forms/SpringForm.tsx';
import { StateForm } from './forms/StateForm.tsx';
import { SupportForm } from './forms/SupportForm.tsx';

/** The form of the chosen entry, whatever list it is of. */
export function EntryForm({ list, id }: Chosen) {
  switch (list) {
    case 'nodes':
      return <Bound list={list} id={id} form={NodeForm} />;
    case 'members':
      return <Bound list={list} id={id} form={MemberForm} />;
    case 'sections':
      return <Bound list={list} id={id} form={SectionForm} />;
    case 'materials':
      return <Bound list={list} id={id} form={MaterialForm} />;
    case 'supports':
      return <Bound list={list} id={id} form={SupportForm} />;
    case 'springs':
      return <Bound list={list} id={id} form={SpringForm} />;
    case 'rigidLinks':
      return <Bound list={list} id={id} form={RigidLinkForm} />;
    case 'masses':
      return <Bound list={list} id={id} form={MassForm} />;
    case 'states':
      return <Bound list={list} id={id} form={StateForm} />;
  }
}

interface BoundProps<List extends DocumentList> {
  readonly list: List;
  readonly id: string;
  readonly form: (props: EntryFormProps<List>) => React.ReactNode;
}

/** Ties a form to its entry: a change becomes a command, a new id keeps the entry chosen. */
function Bound<List extends DocumentList>({ list, id, form: Form }: BoundProps<List>) {
  const { frame, readOnly, problems, run, choose } = useFrameEditing();
  const entry = findEntry(frame, list, id);
  if (!entry) return null;
  const entries: readonly EntryOf<List>[] = frame[list];
  const problem = fieldProblems(problems, list, entries.indexOf(entry));
  const whole = problem('');
  const change = (next: EntryOf<List>) => {
    // The union of commands is indexed by list; the compiler cannot follow the generic through it.
    const command = { kind: 'update', list, id, entry: next } as unknown as FrameCommand;
    const newId = idOf(list, next);
    if (run(command, `change ${labelOf(frame, list, id)}`) && newId !== id) {
      choose([{ list, id: newId }]);
    }
  };
  return (
    <>
      {whole !== undefined && <p className="mb-2 text-sm text-signal-text">▲ {whole}</p>}
      <Form frame={frame} entry={entry} onChange={change} problem={problem} disabled={readOnly} />
    </>
  );
}
