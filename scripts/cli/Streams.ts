import type { Readable } from 'node:stream';

/** Where a command reads and writes. */
export interface Streams {
  readonly input: Readable;
  readonly out: (text: string) => void;
  readonly err: (text: string) => void;
}
