import type { LiveAnswer, LiveQuestion } from './liveProtocol.ts';

type Asked = Omit<LiveQuestion, 'number'>;

/** An answer later than this has gone wrong or is of a frame too large to follow: the worker is started anew [ms]. */
const PATIENCE_MS = 10_000;

/**
 * The live worker as the screen uses it: the newest question counts. While one is being answered only the newest other
 * one waits, and answers to older ones are not given on.
 */
export class LiveSolver {
  readonly #onAnswer: (answer: LiveAnswer, asked: Asked) => void;
  readonly #startWorker: () => Worker;
  #worker: Worker;
  #asked: { readonly question: LiveQuestion; readonly since: number } | null = null;
  #waiting: Asked | null = null;
  #number = 0;

  constructor(
    onAnswer: (answer: LiveAnswer, asked: Asked) => void,
    startWorker: () => Worker = startLiveWorker,
  ) {
    this.#onAnswer = onAnswer;
    this.#startWorker = startWorker;
    this.#worker = this.#start();
  }

  ask(asked: Asked): void {
    const busy = this.#asked;
    if (busy === null) {
      this.#send(asked);
      return;
    }
    this.#waiting = asked;
    if (performance.now() - busy.since > PATIENCE_MS) this.#restart();
  }

  close(): void {
    this.#worker.terminate();
  }

  #start(): Worker {
    const worker = this.#startWorker();
    worker.addEventListener('message', ({ data }: MessageEvent<LiveAnswer>) => this.#take(data));
    worker.addEventListener('error', () => this.#restart());
    return worker;
  }

  #restart(): void {
    this.#worker.terminate();
    this.#worker = this.#start();
    this.#asked = null;
    this.#next();
  }

  #send(asked: Asked): void {
    this.#number += 1;
    const question = { ...asked, number: this.#number };
    this.#asked = { question, since: performance.now() };
    this.#worker.postMessage(question);
  }

  #take(answer: LiveAnswer): void {
    const asked = this.#asked?.question;
    if (asked?.number !== answer.number) return;
    this.#asked = null;
    this.#onAnswer(answer, asked);
    this.#next();
  }

  #next(): void {
    const waiting = this.#waiting;
    this.#waiting = null;
    if (waiting) this.#send(waiting);
  }
}

const startLiveWorker = (): Worker =>
  new Worker(new URL('./liveWorker.ts', import.meta.url), { type: 'module' });
