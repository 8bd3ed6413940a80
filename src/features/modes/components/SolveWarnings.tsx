import type { ModelWarning } from '#shared/schemas/solveResult.ts';
import { NoticeMark } from '#src/components/Notice.tsx';

/** What a person should know of the frame that was solved; folded, since it stands over every mode. */
export function SolveWarnings({ warnings }: { warnings: readonly ModelWarning[] }) {
  if (warnings.length === 0) return null;
  return (
    <details>
      <summary className="flex min-h-6 w-fit cursor-pointer items-center gap-2">
        <NoticeMark kind="caution" />
        {warnings.length === 1 ? 'One thing' : `${warnings.length} things`} to know of this frame
      </summary>
      <ul className="max-h-40 list-disc space-y-1 overflow-y-auto pb-1 pl-9">
        {warnings.map(({ path, message }) => (
          <li key={`${path} ${message}`}>{message}</li>
        ))}
      </ul>
    </details>
  );
}
