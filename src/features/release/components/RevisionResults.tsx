import { useQueries } from '@tanstack/react-query';
import type { RevisionResponse } from '#shared/schemas/revision.ts';
import { solveQuery } from '#src/hooks/useSolve.ts';
import { IncompleteMark } from '#src/components/IncompleteMark.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { formatFrequency } from '#shared/units/formatFrequency.ts';

/** The first natural frequencies that the revision stands for: by state, consistent and lumped side by side. */
export function RevisionResults({ revision }: { readonly revision: RevisionResponse }) {
  const solves = useQueries({ queries: revision.solves.map((one) => solveQuery(one.solveId)) });
  if (solves.some((solve) => solve.isPending)) return <Loading what="results" />;
  const stateIds = [...new Set(revision.solves.map((one) => one.stateId))];
  const summaryOf = (stateId: string | null, method: string) => {
    const index = revision.solves.findIndex(
      (one) => one.stateId === stateId && one.method === method,
    );
    return solves[index]?.data?.summary ?? null;
  };
  return (
    <section aria-labelledby="results-heading">
      <h3 id="results-heading">First natural frequency</h3>
      <div className="mt-1 overflow-x-auto">
        <table className="w-full text-left">
          <thead className="text-sm text-ink-soft">
            <tr className="border-b border-ink">
              <th scope="col" className="py-1 pr-4 font-normal">
                Operating state
              </th>
              <th scope="col" className="py-1 pr-4 text-right font-normal">
                Consistent
              </th>
              <th scope="col" className="py-1 pr-4 text-right font-normal">
                Lumped
              </th>
              <th scope="col" className="py-1 font-normal">
                None-missed count
              </th>
            </tr>
          </thead>
          <tbody>
            {stateIds.map((stateId) => {
              const consistent = summaryOf(stateId, 'consistent');
              const lumped = summaryOf(stateId, 'lumped');
              const state = revision.document.states.find((one) => one.id === stateId);
              const complete = consistent?.complete === true && lumped?.complete === true;
              return (
                <tr key={stateId ?? ''} className="border-b border-rule">
                  <th scope="row" className="py-1.5 pr-4 font-normal">
                    {state?.name ?? 'As drawn'}
                  </th>
                  {[consistent, lumped].map((summary, index) => {
                    const first = summary?.modes.find((mode) => mode.kind !== 'rigid');
                    return (
                      <td key={index} className="num py-1.5 pr-4 text-right">
                        {first
                          ? formatFrequency(first.frequencyHz, Math.min(5, first.digits))
                          : 'none'}
                        {summary?.complete === false && (
                          <span className="block text-sm">
                            <IncompleteMark />
                          </span>
                        )}
                      </td>
                    );
                  })}
                  <td className="py-1.5">{complete ? 'complete' : 'modes may be missing'}</td>
                </tr>
              );
            })}
          </tbody>
        </table>
      </div>
      <p className="mt-2 max-w-prose text-sm text-ink-soft">
        That both mass kinds agree says only that the mesh is fine enough. Supports, joints and the
        beam theory move these values far more; see what they rest on at Frame.
      </p>
    </section>
  );
}
