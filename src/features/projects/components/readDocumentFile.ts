import { checkDocument } from '#shared/frame/checkDocument.ts';
import type { Issue } from '#shared/errors/AppError.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';

/** What a file turned out to hold. */
export type ReadDocument =
  | { ok: true; fileName: string; document: FrameDocument; warnings: readonly Issue[] }
  | { ok: false; fileName: string; sentence: string; issues: readonly Issue[] };

/** As much as the server takes in one request. */
const LARGEST_BYTES = 16 * 2 ** 20;

/** Reads a frame document from a file and checks it here, so that nothing broken is sent. Never throws. */
export async function readDocumentFile(file: File): Promise<ReadDocument> {
  const refuse = (sentence: string, issues: readonly Issue[] = []): ReadDocument => ({
    ok: false,
    fileName: file.name,
    sentence,
    issues,
  });
  if (file.size > LARGEST_BYTES) {
    return refuse(
      `The file is larger than ${LARGEST_BYTES / 2 ** 20} MB, the most a frame may take.`,
    );
  }
  let content: unknown;
  try {
    content = JSON.parse(await file.text());
  } catch {
    return refuse('The file is no JSON: it is damaged, cut short, or of another kind.');
  }
  const { document, errors, warnings } = checkDocument(content, 'draft');
  if (document) return { ok: true, fileName: file.name, document, warnings };
  const count = errors.length === 1 ? 'One thing stands' : `${errors.length} things stand`;
  return refuse(
    `${count} in the way. Nothing has been sent; mend the file and choose it again.`,
    errors,
  );
}
