import { UNKNOWN_SETS } from '#shared/schemas/frameDocument.ts';
import { Select } from '#src/components/Select.tsx';
import { useFrameEditing } from '../../state/FrameEditing.ts';
import { TextField } from '../fields/textFields.tsx';

const SETS = [
  { value: 'u v w rx ry rz', label: 'all six, in space (u v w rx ry rz)' },
  { value: 'u w ry', label: 'in the X–Z plane (u w ry)' },
  { value: 'w ry', label: 'bending of a line along X (w ry)' },
  { value: 'u', label: 'stretch of a line along X (u)' },
] as const;

/** The document's own fields. */
export function FrameForm() {
  const { frame, readOnly, run, problems } = useFrameEditing();
  const error = (path: string) =>
    problems.find((one) => one.path === path && one.weight === 'error')?.message;
  const value = SETS.find((set) => set.value === frame.unknowns.join(' '))?.value ?? SETS[0].value;
  return (
    <div className="grid max-w-2xl gap-4 sm:grid-cols-2">
      <TextField
        label="Name of the frame"
        value={frame.name}
        disabled={readOnly}
        error={error('name')}
        onCommit={(name) => run({ kind: 'set', fields: { name } }, 'name the frame')}
      />
      <Select
        label="Displacements of a node"
        options={SETS}
        value={value}
        disabled={readOnly}
        error={error('unknowns')}
        onValueChange={(chosen) => {
          const unknowns = UNKNOWN_SETS.find((set) => set.join(' ') === chosen);
          if (unknowns) {
            run({ kind: 'set', fields: { unknowns: [...unknowns] } }, 'choose displacements');
          }
        }}
      />
    </div>
  );
}
