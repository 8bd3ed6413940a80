import { useSearchParams } from 'react-router-dom';
import type { FrameDocument, OperatingState } from '#shared/schemas/frameDocument.ts';
import type { RevisionBrief } from '#shared/schemas/revision.ts';
import { useDraft } from './useDraft.ts';
import { useRevision } from './useRevision.ts';
import { useRevisions } from './useRevisions.ts';

/** What a project screen shows: the draft or a revision, in one operating state. The address holds both. */
export interface ShownFrame {
  readonly projectId: string;
  /** null: the draft. */
  readonly revision: RevisionBrief | null;
  /** "Draft" or "R2". */
  readonly label: string;
  readonly document: FrameDocument;
  readonly fingerprint: string;
  /** null: the frame as drawn; it has no operating states. */
  readonly state: OperatingState | null;
}

export interface ShownFrameQuery {
  readonly shown: ShownFrame | null;
  readonly error: Error | null;
  /** The address names a revision that this project does not have. */
  readonly noSuchRevision: boolean;
}

/** Reads `?revision=2&state=tank-full` and loads what it names; an unknown state falls back to the first. */
export function useShownFrame(projectId: string): ShownFrameQuery {
  const [search] = useSearchParams();
  const wanted = search.get('revision');
  const draft = useDraft(projectId);
  const revisions = useRevisions(projectId);
  const brief = revisions.data?.find((revision) => String(revision.number) === wanted) ?? null;
  const revision = useRevision(brief?.id ?? null);

  const noSuchRevision = wanted !== null && revisions.isSuccess && brief === null;
  const source = wanted === null ? draft : revision;
  const document = source.data?.document;
  const fingerprint = wanted === null ? draft.data?.fingerprint : brief?.documentFingerprint;
  if (!document || fingerprint === undefined) {
    return { shown: null, error: source.error ?? revisions.error, noSuchRevision };
  }
  const state =
    document.states.find((one) => one.id === search.get('state')) ?? document.states[0] ?? null;
  return {
    shown: {
      projectId,
      revision: brief,
      label: brief ? `R${brief.number}` : 'Draft',
      document,
      fingerprint,
      state,
    },
    error: null,
    noSuchRevision: false,
  };
}
