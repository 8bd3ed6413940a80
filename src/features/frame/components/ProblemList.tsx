import { NoticeMark } from '#src/components/Notice.tsx';
import { useFrameEditing } from '../state/FrameEditing.ts';

/** Everything that is wrong or worth knowing; each leads to the thing it is about. */
export function ProblemList() {
  const { problems, choose } = useFrameEditing();
  if (problems.length === 0) {
    return <p className="py-3 text-ink-soft">Nothing stands in the way of a solve.</p>;
  }
  return (
    <ul className="h-full overflow-auto py-2">
      {problems.map(({ path, message, weight, entry }, index) => (
        <li key={`${path} ${index}`} className="flex items-start gap-2 border-b border-rule py-1">
          <NoticeMark kind={weight === 'error' ? 'signal' : 'caution'} className="mt-1" />
          <span className="min-w-0 flex-1">
            <span className="sr-only">{weight === 'error' ? 'To mend: ' : 'To know: '}</span>
            {message}
          </span>
          {entry && (
            <button
              type="button"
              className="link min-h-6 shrink-0 cursor-pointer"
              onClick={() => choose([entry])}
            >
              Show<span className="sr-only"> {entry.id}</span>
            </button>
          )}
        </li>
      ))}
    </ul>
  );
}
