import type { ReactNode } from 'react';

interface TitleBlockProps {
  /** What is said of the sheet, label and value. */
  readonly rows: readonly (readonly [label: string, value: ReactNode])[];
  /** Buttons and their progress, under the rows. */
  readonly children?: ReactNode;
}

/**
 * The title block in the lower right corner of a drawing sheet. On small screens it stands under the view instead
 * of on it.
 */
export function TitleBlock({ rows, children }: TitleBlockProps) {
  return (
    <section
      aria-label="Title block"
      className="border-ink bg-sheet text-sm max-md:border-t md:absolute md:right-3 md:bottom-3 md:w-72 md:border"
    >
      <dl>
        {rows.map(([label, value]) => (
          <div
            key={label}
            className="grid grid-cols-[6.5rem_1fr] gap-2 border-b border-rule px-3 py-1 last:border-b-0"
          >
            <dt className="text-ink-soft">{label}</dt>
            <dd className="min-w-0 break-words">{value}</dd>
          </div>
        ))}
      </dl>
      {children !== undefined && <div className="border-t border-ink p-2">{children}</div>}
    </section>
  );
}
