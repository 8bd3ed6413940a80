import { Link } from 'react-router-dom';
import type { SolveBrief } from '#shared/schemas/solve.ts';
import { METHODS } from '#shared/schemas/solveResult.ts';
import { formatFrequency } from '#shared/units/formatFrequency.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { IncompleteMark } from '#src/components/IncompleteMark.tsx';
import { NoticeMark } from '#src/components/Notice.tsx';
import { Progress } from '#src/components/Progress.tsx';
import type { ShownFrame } from '#src/hooks/useShownFrame.ts';
import { useShownSolves } from '#src/hooks/useShownSolves.ts';
import { useSolveActions } from '#src/hooks/useSolveActions.ts';
import { methodName } from '#src/lib/methodName.ts';

interface SolvePanelProps {
  readonly shown: ShownFrame;
  readonly maySolve: boolean;
  /** What is on screen differs from what is stored: results are of an earlier draft. */
  readonly changed: boolean;
  /** Stores what is unsaved first; false: it could not be stored, and nothing is solved. */
  readonly beforeSolve: () => Promise<boolean>;
  /** Leads to the thing that a path of the document points at. */
  readonly onShow: (path: string) => void;
  readonly modesHref: string;
}

/** Digits of the first frequency beside the press; Modes shows those that its accuracy supports. */
const FIRST_DIGITS = 3;

const isActive = ({ status }: SolveBrief): boolean => status === 'queued' || status === 'running';

/** The press that solves the chosen state by every method, how far it is, and what came of it. */
export function SolvePanel({
  shown,
  maySolve,
  changed,
  beforeSolve,
  onShow,
  modesHref,
}: SolvePanelProps) {
  const { projectId, revision, document, state } = shown;
  const { current } = useShownSolves(projectId, shown);
  const { start, cancel } = useSolveActions(projectId);
  const solves = METHODS.flatMap((method) => current[method] ?? []);
  const active = solves.filter(isActive);
  const done = !changed && current.consistent?.status === 'done';
  const failed = changed ? [] : solves.filter(({ status }) => status === 'failed');
  const { states } = document;

  const solve = async (stateIds: readonly (string | null)[]) => {
    if (await beforeSolve()) start.mutate({ revisionId: revision?.id ?? null, stateIds });
  };

  return (
    <div className="space-y-2">
      {maySolve && (
        <div className="flex flex-wrap gap-2">
          <Button
            look="primary"
            className="flex-1"
            busy={start.isPending || active.length > 0}
            onClick={() => void solve([state?.id ?? null])}
          >
            Solve
          </Button>
          {states.length > 1 && (
            <Button busy={start.isPending} onClick={() => void solve(states.map(({ id }) => id))}>
              Solve all {states.length} states
            </Button>
          )}
        </div>
      )}
      <div aria-live="polite" className="space-y-1">
        {solves
          .filter((one) => !changed || isActive(one))
          .map((one) => (
            <SolveLine key={one.id} solve={one} name={methodName(one.method, document)} />
          ))}
        {changed && solves.length > 0 && active.length === 0 && (
          <p className="flex gap-2 text-ink-soft">
            <NoticeMark kind="caution" className="mt-0.5" />
            Changed since the last solve.
          </p>
        )}
      </div>
      {active.length > 0 && maySolve && (
        <Button
          look="quiet"
          busy={cancel.isPending}
          onClick={() => cancel.mutate(active.map(({ id }) => id))}
        >
          Cancel
        </Button>
      )}
      {failed.map((one) => (
        <Failure key={one.id} solve={one} name={methodName(one.method, document)} onShow={onShow} />
      ))}
      {start.isError && <ErrorNote error={start.error} />}
      {cancel.isError && <ErrorNote error={cancel.error} />}
      {done && (
        <Link to={modesHref} className="link inline-flex min-h-6 items-center font-medium">
          See the modes
        </Link>
      )}
    </div>
  );
}

function SolveLine({ solve, name }: { solve: SolveBrief; name: string }) {
  if (isActive(solve)) {
    return (
      <div>
        <span className="text-ink-soft">
          {name}: {solve.status === 'queued' ? 'waits for its turn' : solve.stage}
        </span>
        <Progress label={`Solve, ${name}`} value={solve.progress} />
      </div>
    );
  }
  return (
    <p className="flex justify-between gap-2">
      <span className="text-ink-soft">{name}</span>
      <span className="shrink-0 text-right">
        {outcomeOf(solve)} {solve.complete === false && <IncompleteMark />}
      </span>
    </p>
  );
}

function outcomeOf(solve: SolveBrief): string {
  if (solve.status === 'failed') return 'failed';
  if (solve.status === 'cancelled') return 'cancelled';
  return solve.firstFrequencyHz === null
    ? 'solved'
    : `first ${formatFrequency(solve.firstFrequencyHz, FIRST_DIGITS)}`;
}

interface FailureProps {
  readonly solve: SolveBrief;
  readonly name: string;
  readonly onShow: SolvePanelProps['onShow'];
}

/** Why a solve failed: each reason, and the way to the thing it names. */
function Failure({ solve, name, onShow }: FailureProps) {
  const { error } = solve;
  if (!error) return null;
  return (
    <div role="alert" className="max-h-40 overflow-auto border-l-2 border-signal pl-2">
      <p>
        <NoticeMark kind="signal" className="mr-1 align-text-bottom" />
        {name}: {error.message}
      </p>
      <ul>
        {error.issues.map(({ path, message }, index) => (
          <li key={`${path} ${index}`} className="mt-1">
            {message}{' '}
            {path !== '' && (
              <button type="button" className="link cursor-pointer" onClick={() => onShow(path)}>
                Show
              </button>
            )}
          </li>
        ))}
      </ul>
    </div>
  );
}
