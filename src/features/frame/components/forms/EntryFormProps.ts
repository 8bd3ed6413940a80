import type { DocumentList } from '#shared/frame/documentDiff.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { EntryOf } from '../../state/lists.ts';
import type { FieldProblems } from '../../state/problems.ts';

/** What the form of one entry works on; every finished field is one change of the document. */
export interface EntryFormProps<List extends DocumentList> {
  readonly frame: FrameDocument;
  readonly entry: EntryOf<List>;
  readonly onChange: (entry: EntryOf<List>) => void;
  readonly problem: FieldProblems;
  readonly disabled: boolean;
}
