import { clsx } from 'clsx';
import { useId, useState, type DragEvent } from 'react';

/** Choose a file, or drop it here. */
export function FileDrop({ onFile }: { onFile: (file: File) => void }) {
  const id = useId();
  const [over, setOver] = useState(false);
  const take = (files: FileList | null) => {
    const file = files?.[0];
    if (file) onFile(file);
  };
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    take(event.dataTransfer.files);
  };
  return (
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      className={clsx('border border-dashed p-5', over ? 'border-ink bg-sheet' : 'border-pencil')}
    >
      <label htmlFor={id} className="block font-medium">
        Frame document
      </label>
      <p id={`${id}-hint`} className="mb-3 text-sm text-ink-soft">
        A JSON file. It is checked in this window before anything is sent. You can also drop it
        here.
      </p>
      <input
        id={id}
        type="file"
        accept=".json,application/json"
        aria-describedby={`${id}-hint`}
        onChange={(event) => {
          take(event.target.files);
          // The same file, mended, can be chosen again.
          event.target.value = '';
        }}
        className="block w-full text-sm file:mr-3 file:min-h-8 file:cursor-pointer file:rounded file:border file:border-pencil file:bg-sheet file:px-3 file:text-ink"
      />
    </div>
  );
}
