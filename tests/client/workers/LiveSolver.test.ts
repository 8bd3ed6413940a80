import { describe, expect, it } from 'vitest';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { LiveAnswer, LiveQuestion } from '#src/workers/liveProtocol.ts';
import { LiveSolver } from '#src/workers/LiveSolver.ts';
import { aStand } from '#tests/builders/aFrame.ts';
import { accepted } from '#tests/builders/aLine.ts';

/** A worker that answers when told to. */
class HeldWorker extends EventTarget {
  readonly questions: LiveQuestion[] = [];
  terminated = false;

  postMessage(question: LiveQuestion): void {
    this.questions.push(question);
  }

  terminate(): void {
    this.terminated = true;
  }

  answer(number: number): void {
    const data: LiveAnswer = {
      kind: 'found',
      number,
      frequenciesHz: Float64Array.of(number),
      errorsHz: Float64Array.of(0),
      certified: false,
    };
    this.dispatchEvent(new MessageEvent('message', { data }));
  }
}

function held() {
  const workers: HeldWorker[] = [];
  const answered: FrameDocument[] = [];
  const solver = new LiveSolver(
    (_, { document }) => answered.push(document),
    () => {
      const worker = new HeldWorker();
      workers.push(worker);
      return worker as unknown as Worker;
    },
  );
  return { solver, workers, answered };
}

const documents = [1, 2, 3, 4].map((divisions) => accepted(aStand({ divisions })));
const asked = (i: number) => ({ document: documents[i]!, stateId: null, modes: 4 });

describe('the live solver', () => {
  it('asks one question at a time and leaves out what a newer one has overtaken', () => {
    const { solver, workers, answered } = held();
    for (const i of [0, 1, 2, 3]) solver.ask(asked(i));
    const [worker] = workers;
    expect(worker!.questions.map(({ document }) => document)).toEqual([documents[0]]);
    worker!.answer(1);
    expect(worker!.questions.map(({ document }) => document)).toEqual([documents[0], documents[3]]);
    worker!.answer(2);
    expect(answered).toEqual([documents[0], documents[3]]);
  });

  it('gives no answer twice, and none that nobody asked for', () => {
    const { solver, workers, answered } = held();
    solver.ask(asked(0));
    workers[0]!.answer(1);
    workers[0]!.answer(1);
    workers[0]!.answer(7);
    expect(answered).toHaveLength(1);
  });

  it('starts a new worker where one has failed, and asks it what waits', () => {
    const { solver, workers } = held();
    solver.ask(asked(0));
    solver.ask(asked(1));
    workers[0]!.dispatchEvent(new Event('error'));
    expect(workers).toHaveLength(2);
    expect(workers[0]!.terminated).toBe(true);
    expect(workers[1]!.questions.map(({ document }) => document)).toEqual([documents[1]]);
  });

  it('ends its worker when it is closed', () => {
    const { solver, workers } = held();
    solver.close();
    expect(workers[0]!.terminated).toBe(true);
  });
});
