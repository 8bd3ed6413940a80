import { BAR_WORD } from '#src/viewer/barWord.ts';
import type { Adding, AddingWhat } from '../state/useAdding.ts';

export interface ViewSwitches {
  readonly names: boolean;
  readonly memberAxes: boolean;
}

interface FrameToolsProps {
  readonly adding: Adding | null;
  readonly undo: { readonly label: string | null; readonly run: () => void };
  readonly redo: { readonly label: string | null; readonly run: () => void };
  readonly switches: ViewSwitches;
  readonly onSwitch: (switches: ViewSwitches) => void;
}

const ADDS: readonly { what: AddingWhat; word: string }[] = [
  { what: 'node', word: 'Add node' },
  { what: 'member', word: 'Add member' },
  { what: 'support', word: 'Add support' },
  { what: 'mass', word: 'Add mass' },
];

/** The words above the view. `adding` is null where the document can only be read. */
export function FrameTools({ adding, undo, redo, switches, onSwitch }: FrameToolsProps) {
  return (
    <>
      {adding && (
        <>
          {ADDS.map(({ what, word }) => (
            <button
              key={what}
              type="button"
              className={BAR_WORD}
              aria-pressed={adding.what === what}
              onClick={() => (adding.what === what ? adding.stop() : adding.start(what))}
            >
              {word}
            </button>
          ))}
          <Rule />
          <Step word="Undo" {...undo} />
          <Step word="Redo" {...redo} />
          <Rule />
        </>
      )}
      <button
        type="button"
        className={BAR_WORD}
        aria-pressed={switches.names}
        onClick={() => onSwitch({ ...switches, names: !switches.names })}
      >
        Labels
      </button>
      <button
        type="button"
        className={BAR_WORD}
        aria-pressed={switches.memberAxes}
        onClick={() => onSwitch({ ...switches, memberAxes: !switches.memberAxes })}
      >
        Member axes
      </button>
    </>
  );
}

function Step({ word, label, run }: { word: string; label: string | null; run: () => void }) {
  return (
    <button
      type="button"
      className={BAR_WORD}
      disabled={label === null}
      title={label === null ? undefined : `${word}: ${label}`}
      onClick={run}
    >
      {word}
    </button>
  );
}

const Rule = () => <span aria-hidden="true" className="mx-1 h-5 w-px shrink-0 bg-rule" />;
