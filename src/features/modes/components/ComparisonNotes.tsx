import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { Notice } from '#src/components/Notice.tsx';

/** What it means that the methods agree, and why they may not although the mesh is fine. */
export function ComparisonNotes({ document }: { document: Pick<FrameDocument, 'members'> }) {
  const { members } = document;
  const hasBars = members.some(({ kind }) => kind === 'bar');
  const hasTimoshenko = members.some(
    ({ kind, theory }) => kind === 'beam' && theory === 'timoshenko',
  );
  return (
    <Notice kind="caution" word="What agreement means">
      That lumped and consistent agree says only that the mesh is fine enough. It says nothing about
      supports, joints or the choice of beam theory, which move these values far more. Mesh-free
      solves the members of the same theory whole: it is free of mesh error, not of modelling error.
      Consistent mass comes from above it, lumped usually from below, but that is no guarantee.
      {hasBars && ' Bars never divide, so this frame need not converge to mesh-free.'}
      {hasTimoshenko &&
        ' Lumped mass carries no rotary inertia of bending: with Timoshenko members it tends to another limit than the other two.'}
    </Notice>
  );
}
