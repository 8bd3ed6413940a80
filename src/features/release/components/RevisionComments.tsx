import { useState } from 'react';
import type { RevisionResponse } from '#shared/schemas/revision.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { TextArea } from '#src/components/TextInput.tsx';
import { formatDateTime } from '#src/lib/formatTime.ts';
import { useCommentOnRevision } from '../api/useRevisionActions.ts';

/** What has been said about the revision, oldest first, and a field to add to it. */
export function RevisionComments({ revision }: { readonly revision: RevisionResponse }) {
  const comment = useCommentOnRevision(revision.id);
  const [text, setText] = useState('');
  // One id per text: pressing twice, or again after a lost answer, makes one comment.
  const [id, setId] = useState(() => crypto.randomUUID());
  if (revision.comments.length === 0 && !revision.abilities.comment) return null;
  return (
    <section aria-labelledby="comments-heading">
      <h3 id="comments-heading">Comments</h3>
      {revision.comments.length > 0 && (
        <ul className="mt-1 border-t border-rule">
          {revision.comments.map((one) => (
            <li key={one.id} className="border-b border-rule py-2">
              <p>
                <strong className="font-medium">{one.author.name}</strong>
                <span className="text-sm text-ink-soft">, {formatDateTime(one.at)}</span>
              </p>
              <p className="mt-1 max-w-prose break-words whitespace-pre-wrap">{one.body}</p>
            </li>
          ))}
        </ul>
      )}
      {revision.abilities.comment && (
        <form
          className="mt-3 flex max-w-prose flex-col gap-2"
          onSubmit={(event) => {
            event.preventDefault();
            if (text.trim() === '') return;
            comment.mutate(
              { id, body: text.trim() },
              {
                onSuccess: () => {
                  setText('');
                  setId(crypto.randomUUID());
                },
              },
            );
          }}
        >
          <TextArea
            label="Add a comment"
            rows={3}
            maxLength={4000}
            value={text}
            onChange={(event) => setText(event.target.value)}
          />
          {comment.error && <ErrorNote error={comment.error} />}
          <Button
            type="submit"
            className="self-start"
            busy={comment.isPending}
            disabled={text.trim() === ''}
          >
            Comment
          </Button>
        </form>
      )}
    </section>
  );
}
