import { LiveFrame } from '#shared/analysis/LiveFrame.ts';
import { AppError } from '#shared/errors/AppError.ts';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import type { LiveAnswer, LiveQuestion } from './liveProtocol.ts';

/**
 * Frequencies of the frame on the screen, in a thread of the browser's own. One frame is followed at a time; what is
 * kept of it goes with the operating state or the number of modes.
 */
let live: {
  readonly frame: LiveFrame;
  readonly stateId: string | null;
  readonly modes: number;
} | null = null;

self.addEventListener('message', ({ data }: MessageEvent<LiveQuestion>) => {
  const answer = answerTo(data);
  const transfer =
    answer.kind === 'found' ? [answer.frequenciesHz.buffer, answer.errorsHz.buffer] : [];
  self.postMessage(answer, { transfer });
});

function answerTo({ number, document: input, stateId, modes }: LiveQuestion): LiveAnswer {
  try {
    const { document, errors } = checkDocument(input);
    if (document === null) {
      throw new AppError('invalid-document', 'The frame cannot be solved as it is.', {
        issues: errors,
      });
    }
    if (live?.stateId !== stateId || live.modes !== modes) {
      live = { frame: new LiveFrame({ massKind: 'consistent', stateId, modes }), stateId, modes };
    }
    const { frequenciesHz, errorsHz, certified } = live.frame.follow(document);
    return { kind: 'found', number, frequenciesHz, errorsHz, certified };
  } catch (error) {
    live = null;
    if (error instanceof AppError) return { kind: 'refused', number, error: error.toWire() };
    throw error;
  }
}
