import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { Link, useSearchParams } from 'react-router-dom';
import { z } from 'zod';
import type { ProjectResponse } from '#shared/schemas/project.ts';
import type { RevisionBrief } from '#shared/schemas/revision.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Notice } from '#src/components/Notice.tsx';
import { TextArea } from '#src/components/TextInput.tsx';
import { useDraft } from '#src/hooks/useDraft.ts';
import { useSubmitRevision } from '../api/useRevisionActions.ts';
import { missingSolves } from '../state/missingSolves.ts';
import { useDraftSolves } from '../api/useDraftSolves.ts';

interface SubmitDraftProps {
  readonly project: ProjectResponse;
  readonly revisions: readonly RevisionBrief[];
}

const form = z.object({
  changeNote: z
    .string()
    .trim()
    .min(1, 'Say what changed and why, for whoever reviews it.')
    .max(4000),
});

/** Submitting the draft: what is still missing, the change note, the button. */
export function SubmitDraft({ project, revisions }: SubmitDraftProps) {
  const draft = useDraft(project.id);
  const solves = useDraftSolves(project.id, draft.data?.fingerprint);
  const submit = useSubmitRevision(project.id);
  const [, setSearch] = useSearchParams();
  const { register, handleSubmit, formState, reset } = useForm({
    resolver: zodResolver(form),
    defaultValues: { changeNote: '' },
  });

  if (!draft.data || !solves.data) return null;
  const underWay = revisions.find(
    (revision) => revision.state === 'submitted' || revision.state === 'accepted',
  );
  const unchanged = revisions[0]?.documentFingerprint === draft.data.fingerprint;
  const missing = missingSolves(draft.data.document, solves.data);
  const next = (revisions[0]?.number ?? 0) + 1;
  const { version } = draft.data;

  return (
    <section aria-labelledby="submit-heading">
      <h2 id="submit-heading">Submit the draft as R{next}</h2>
      {underWay ? (
        <p className="mt-1 text-ink-soft">
          R{underWay.number} is under way. Recall it, or wait for its outcome, before the next one.
        </p>
      ) : missing.length > 0 ? (
        <div className="mt-2">
          <Notice kind="caution" word="Not yet">
            These solves of the draft are missing or incomplete:
            <ul className="mt-1 list-disc pl-5">
              {missing.map((text) => (
                <li key={text}>{text}</li>
              ))}
            </ul>
          </Notice>
          <Button asChild className="mt-3">
            <Link to={`/projects/${project.id}/frame`}>Solve them at Frame</Link>
          </Button>
        </div>
      ) : (
        <form
          className="mt-2 flex flex-col gap-3"
          noValidate
          onSubmit={(event) =>
            void handleSubmit(({ changeNote }) =>
              submit.mutate(
                { draftVersion: version, changeNote },
                {
                  onSuccess: (revision) => {
                    reset();
                    setSearch({ revision: String(revision.number) });
                  },
                },
              ),
            )(event)
          }
        >
          {unchanged && (
            <Notice kind="plain">The draft is the same as R{revisions[0]?.number}.</Notice>
          )}
          <TextArea
            label="Change note"
            hint="What changed since the last revision, and why."
            error={formState.errors.changeNote?.message}
            {...register('changeNote')}
          />
          {submit.error && <ErrorNote error={submit.error} />}
          <Button type="submit" look="primary" busy={submit.isPending} className="self-start">
            Submit for review
          </Button>
        </form>
      )}
    </section>
  );
}
