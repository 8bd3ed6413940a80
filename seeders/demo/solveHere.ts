import { randomUUID } from 'node:crypto';
import { runSolve } from '#shared/analysis/runSolve.ts';
import { DEFAULT_SOLVE_SETTINGS, METHODS } from '#shared/schemas/solveResult.ts';
import { requestSolves } from '#server/commands/requestSolves.ts';
import { Draft } from '#server/models/Draft.ts';
import { FrameDocumentRecord } from '#server/models/FrameDocumentRecord.ts';
import type { Person } from '#server/models/Person.ts';
import { claimSolve, finishSolve } from '#server/workers/solveQueue.ts';

/** Solves the draft in every operating state by every method, in this process, as a runner would. */
export async function solveHere(person: Person, projectId: string): Promise<void> {
  const draft = await Draft.findByPk(projectId, { rejectOnEmpty: true });
  const document = await FrameDocumentRecord.read(person.teamId, draft.fingerprint);
  const stateIds = document.states.length > 0 ? document.states.map(({ id }) => id) : [null];
  const runnerId = randomUUID();
  for (const stateId of stateIds) {
    const solves = await requestSolves(person, {
      projectId,
      revisionId: null,
      stateId,
      methods: [...METHODS],
      settings: DEFAULT_SOLVE_SETTINGS,
    });
    for (const { id, status } of solves) {
      if (status === 'done') continue;
      const solve = await claimSolve(id, runnerId);
      if (solve === null) continue;
      const { method, settings } = solve;
      const reply = runSolve({ document, method, stateId, settings }, {});
      if (reply.kind !== 'done') throw new Error(`${document.name}: ${reply.error.message}`);
      await finishSolve({ id, runnerId, attempt: solve.attempt }, solve, reply);
    }
  }
}
