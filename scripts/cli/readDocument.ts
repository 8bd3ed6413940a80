import { createReadStream } from 'node:fs';
import type { Readable } from 'node:stream';
import { AppError } from '#shared/errors/AppError.ts';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { ModelWarning } from '#shared/schemas/solveResult.ts';

/** Larger files are refused before they are read: no frame within the document's limits comes near. */
export const MOST_BYTES = 100 * 2 ** 20;

export interface ReadDocument {
  readonly document: FrameDocument;
  readonly warnings: readonly ModelWarning[];
}

/**
 * The text of a frame document.
 *   file   path, or `-` for standard input
 * Throws AppError `invalid-request` where it cannot be read, `too-large` past 100 MB.
 */
export async function readText(file: string, input: Readable): Promise<string> {
  const name = file === '-' ? 'Standard input' : `“${file}”`;
  const chunks: Buffer[] = [];
  let bytes = 0;
  try {
    for await (const chunk of file === '-' ? input : createReadStream(file)) {
      const buffer = Buffer.from(chunk as Uint8Array);
      bytes += buffer.length;
      if (bytes > MOST_BYTES) break;
      chunks.push(buffer);
    }
  } catch (cause) {
    throw new AppError(
      'invalid-request',
      `${name} cannot be read: ${readReason(cause)}.`,
      {},
      cause,
    );
  }
  if (bytes > MOST_BYTES) {
    throw new AppError('too-large', `${name} is larger than 100 MB, the most this command reads.`);
  }
  return Buffer.concat(chunks).toString('utf8');
}

function readReason(cause: unknown): string {
  const code = cause instanceof Error && 'code' in cause ? cause.code : undefined;
  if (code === 'ENOENT') return 'there is no such file';
  if (code === 'EISDIR') return 'it is a folder';
  if (code === 'EACCES') return 'you may not read it';
  return cause instanceof Error ? cause.message : String(cause);
}

/** The frame document in a text; throws AppError `invalid-document` with every refusal. */
export function parseDocument(text: string): ReadDocument {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (cause) {
    const reason = cause instanceof Error ? cause.message : String(cause);
    throw new AppError('invalid-document', `This is not JSON: ${reason}.`, {}, cause);
  }
  const { document, errors, warnings } = checkDocument(value);
  if (document === null) {
    throw new AppError('invalid-document', 'The frame document is refused.', { issues: errors });
  }
  return { document, warnings };
}
