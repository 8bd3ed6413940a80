import { randomUUID } from 'node:crypto';
import { vi } from 'vitest';
import type { ProjectResponse } from '#shared/schemas/project.ts';
import type { RevisionResponse } from '#shared/schemas/revision.ts';
import type { SolveBrief } from '#shared/schemas/solve.ts';
import { aPortal, type FrameInput } from '#tests/builders/aFrame.ts';
import type { Client } from './client.ts';

/** Makes a project through the API; its maker is a designer. */
export async function aProject(
  designer: Client,
  document: FrameInput = aPortal(),
): Promise<ProjectResponse> {
  const response = await designer
    .post('/api/projects', { id: randomUUID(), name: 'Stand 4', machine: 'Press 12', document })
    .expect(201);
  return response.body as ProjectResponse;
}

export async function readSolves(client: Client, projectId: string): Promise<SolveBrief[]> {
  const response = await client.get(`/api/solves?projectId=${projectId}`).expect(200);
  return (response.body as { solves: SolveBrief[] }).solves;
}

/** Asks for consistent and lumped solves in each state and waits until they have ended. */
export async function solveAll(
  client: Client,
  projectId: string,
  states: readonly (string | null)[] = [null],
): Promise<SolveBrief[]> {
  for (const stateId of states) {
    await client.post('/api/solves', { projectId, stateId }).expect(202);
  }
  return vi.waitFor(
    async () => {
      const solves = await readSolves(client, projectId);
      if (solves.some(({ status }) => status === 'queued' || status === 'running')) {
        throw new Error('Still solving.');
      }
      return solves;
    },
    { timeout: 25_000, interval: 100 },
  );
}

/** Solves the draft and submits it. */
export async function submit(designer: Client, projectId: string): Promise<RevisionResponse> {
  await solveAll(designer, projectId);
  const project = await designer.get(`/api/projects/${projectId}`).expect(200);
  const response = await designer
    .post(`/api/projects/${projectId}/revisions`, {
      draftVersion: (project.body as ProjectResponse).draftVersion,
      changeNote: 'Stiffer legs.',
    })
    .expect(201);
  return response.body as RevisionResponse;
}
