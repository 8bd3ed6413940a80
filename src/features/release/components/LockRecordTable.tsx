import type { LockRecord, RevisionResponse } from '#shared/schemas/revision.ts';
import { formatDateTime } from '#src/lib/formatTime.ts';

interface LockRecordTableProps {
  readonly lock: LockRecord;
  readonly revision: RevisionResponse;
}

/** What was locked, each with its fingerprint, so that anybody can hold a copy against it. */
export function LockRecordTable({ lock, revision }: LockRecordTableProps) {
  const { content } = lock;
  const stateName = (id: string | null): string =>
    id === null
      ? 'as drawn'
      : (revision.document.states.find((state) => state.id === id)?.name ?? id);
  const rows: [string, string][] = [
    ['Lock record', lock.fingerprint],
    ['Document', content.documentFingerprint],
    ...content.results.flatMap((result): [string, string][] => {
      const of = `${result.method} mass, ${stateName(result.stateId)}`;
      return [
        [`Results, ${of}`, result.summaryFingerprint],
        [`Shapes, ${of}`, result.shapesFingerprint],
      ];
    }),
    [`Audit chain up to entry ${content.auditSequence}`, content.auditHead],
  ];
  return (
    <section aria-labelledby="lock-heading">
      <h3 id="lock-heading">Lock record</h3>
      <p className="mt-1 max-w-prose text-sm text-ink-soft">
        Locked {formatDateTime(content.approvedAt)} with solver {content.solverVersion}. Scope:{' '}
        {content.scope}. The fingerprints (SHA-256 over canonical JSON, RFC 8785) show that nothing
        was altered since; they do not show that it is correct.
      </p>
      <div className="mt-2 overflow-x-auto">
        <table className="w-full text-left text-sm">
          <caption className="sr-only">Fingerprints of what is locked</caption>
          <tbody>
            {rows.map(([what, fingerprint]) => (
              <tr key={what} className="border-t border-rule align-top">
                <th scope="row" className="py-1 pr-4 font-normal text-ink-soft">
                  {what}
                </th>
                <td className="num py-1 break-all">{fingerprint}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </section>
  );
}
