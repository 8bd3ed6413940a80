import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { Method } from '#shared/schemas/solveResult.ts';

type Members = Pick<FrameDocument, 'members'>;

/** The beam theories that the beams of a frame use, by their names: "Timoshenko", "Bernoulli-Euler", or both. */
export function theoryName({ members }: Members): string {
  const theories = new Set(
    members.filter(({ kind }) => kind === 'beam').map(({ theory }) => theory),
  );
  const names = [
    ...(theories.has('timoshenko') ? ['Timoshenko'] : []),
    ...(theories.has('bernoulli') ? ['Bernoulli-Euler'] : []),
  ];
  return names.length > 0 ? names.join(' and ') : 'bars only';
}

/** What a method is called on screen. Mesh-free never stands without the theory whose values it gives. */
export function methodName(method: Method, document: Members): string {
  return method === 'mesh-free' ? `mesh-free, ${theoryName(document)}` : `${method} mass`;
}
