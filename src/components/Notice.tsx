import { clsx } from 'clsx';
import type { ReactNode } from 'react';

export type NoticeKind = 'signal' | 'caution' | 'clear' | 'plain';

const KINDS = {
  signal: { word: 'Attention', text: 'text-signal-text', edge: 'border-signal' },
  caution: { word: 'Caution', text: 'text-caution', edge: 'border-caution' },
  clear: { word: 'Done', text: 'text-clear', edge: 'border-clear' },
  plain: { word: 'Note', text: 'text-ink', edge: 'border-pencil' },
} as const;

/** The shape of each kind, so that colour never speaks alone: triangle, lozenge, ring, dash. */
export function NoticeMark({ kind, className }: { kind: NoticeKind; className?: string }) {
  return (
    <svg
      viewBox="0 0 16 16"
      aria-hidden="true"
      className={clsx('inline-block size-4 shrink-0', KINDS[kind].text, className)}
    >
      {kind === 'signal' && <path d="M8 1.5 15 14H1z" fill="currentColor" />}
      {kind === 'caution' && (
        <path d="M8 1.5 14.5 8 8 14.5 1.5 8z" fill="none" stroke="currentColor" strokeWidth="2" />
      )}
      {kind === 'clear' && (
        <circle cx="8" cy="8" r="5.5" fill="none" stroke="currentColor" strokeWidth="2" />
      )}
      {kind === 'plain' && <path d="M2 8h12" stroke="currentColor" strokeWidth="2" />}
    </svg>
  );
}

interface NoticeProps {
  kind: NoticeKind;
  /** The word before the text; by default the kind's own ("Caution"). */
  word?: string;
  children: ReactNode;
  className?: string;
}

/** One thing a person should know, beside what it is about. */
export function Notice({ kind, word, children, className }: NoticeProps) {
  return (
    <div className={clsx('flex gap-2 border-l-2 py-1 pl-3', KINDS[kind].edge, className)}>
      <NoticeMark kind={kind} className="mt-[3px]" />
      <div className="min-w-0">
        <strong className={clsx('mr-1.5 font-semibold', KINDS[kind].text)}>
          {word ?? KINDS[kind].word}
        </strong>
        {children}
      </div>
    </div>
  );
}
