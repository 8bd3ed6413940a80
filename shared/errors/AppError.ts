/** Every error code the product can answer with. Each has exactly one HTTP status (server/middlewares/errors.ts). */
export type ErrorCode =
  | 'malformed-request'
  | 'unsupported-media-type'
  | 'invalid-request'
  | 'invalid-document'
  | 'not-signed-in'
  | 'wrong-credentials'
  | 'forbidden'
  | 'not-found'
  | 'conflict'
  | 'stale-version'
  | 'too-large'
  | 'too-many-requests'
  | 'cancelled'
  | 'time-limit'
  | 'memory-limit'
  | 'mechanism'
  | 'unsolvable'
  | 'token-expired'
  | 'unavailable'
  | 'internal';

/** One thing wrong with the input: where (a path such as `members.3.section`) and a sentence a person understands. */
export interface Issue {
  readonly path: string;
  readonly message: string;
}

/** Structured particulars of an error; `issues` is what forms and the command line list. */
export interface ErrorDetails {
  readonly issues?: readonly Issue[];
  readonly [key: string]: unknown;
}

/** What crosses a thread or process boundary in place of an Error object. */
export interface WireError {
  readonly code: ErrorCode;
  readonly message: string;
  readonly details: ErrorDetails;
}

/** The only error class thrown on purpose. The message is for people: it names the thing and the remedy. */
export class AppError extends Error {
  readonly code: ErrorCode;
  readonly details: ErrorDetails;

  constructor(code: ErrorCode, message: string, details: ErrorDetails = {}, cause?: unknown) {
    super(message, cause === undefined ? undefined : { cause });
    this.name = 'AppError';
    this.code = code;
    this.details = details;
  }

  toWire(): WireError {
    return { code: this.code, message: this.message, details: this.details };
  }

  static fromWire(wire: WireError): AppError {
    return new AppError(wire.code, wire.message, wire.details);
  }
}
