import { ChevronLeft, ChevronRight } from 'lucide-react';
import type { ReactNode } from 'react';
import type { OperatingState } from '#shared/schemas/frameDocument.ts';
import type { ModeSummary } from '#shared/schemas/solveResult.ts';
import { Button } from '#src/components/Button.tsx';
import { Select } from '#src/components/Select.tsx';
import { formatModeFrequency } from '../state/formatMode.ts';
import { LOOKS, type Look } from '../state/looks.ts';

interface ModeStripProps {
  readonly modes: readonly ModeSummary[];
  readonly mode: ModeSummary;
  readonly look: Look;
  readonly states: readonly OperatingState[];
  readonly stateId: string | null;
  /** Stands here where no view has a strip of its own. */
  readonly playbackBar: ReactNode;
  readonly onMode: (number: number) => void;
  readonly onLook: (look: Look) => void;
  readonly onState: (stateId: string) => void;
}

/** The quiet strip over the view: which mode, which way of looking, which state, how it moves. */
export function ModeStrip(props: ModeStripProps) {
  const { modes, mode, look, states, stateId, onMode, onLook, onState } = props;
  const at = modes.findIndex((one) => one.number === mode.number);
  const before = modes[at - 1];
  const after = modes[at + 1];
  return (
    <div className="flex flex-wrap items-center gap-x-5 gap-y-1 border-b border-rule px-3 py-1.5">
      <div
        role="group"
        aria-label="Ways of looking"
        className="flex max-w-full gap-1 overflow-x-auto"
      >
        {LOOKS.map((one) => (
          <button
            key={one.value}
            type="button"
            aria-pressed={one.value === look}
            onClick={() => onLook(one.value)}
            className="min-h-8 shrink-0 cursor-pointer border-b-2 border-transparent px-2 text-ink-soft hover:text-ink aria-pressed:border-ink aria-pressed:text-ink"
          >
            {one.label}
          </button>
        ))}
      </div>
      <div role="group" aria-label="Mode" className="flex items-center gap-1">
        <Button
          look="quiet"
          aria-label="Previous mode"
          disabled={!before}
          onClick={() => before && onMode(before.number)}
        >
          <ChevronLeft aria-hidden="true" className="size-4" />
        </Button>
        <span className="min-w-28 text-center" aria-live="polite">
          Mode {mode.number} of {modes.length}
          <span className="sr-only">
            , {formatModeFrequency(mode)}, {mode.name}
          </span>
        </span>
        <Button
          look="quiet"
          aria-label="Next mode"
          disabled={!after}
          onClick={() => after && onMode(after.number)}
        >
          <ChevronRight aria-hidden="true" className="size-4" />
        </Button>
      </div>
      {states.length > 0 && (
        <div className="w-44">
          <Select
            label="Operating state"
            labelHidden
            options={states.map((state) => ({ value: state.id, label: state.name }))}
            value={stateId ?? ''}
            onValueChange={onState}
          />
        </div>
      )}
      {look === 'sheet' && props.playbackBar}
    </div>
  );
}
