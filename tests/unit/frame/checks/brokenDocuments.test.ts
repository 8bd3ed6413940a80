import { describe, expect, it } from 'vitest';

import { checkDocument } from '#shared/frame/checkDocument.ts';
import { brokenDocuments } from '#tests/fixtures/brokenDocuments.ts';

describe('a document broken in one way', () => {
  it.each(brokenDocuments())('refuses $name at $path', ({ document, path, word }) => {
    const { document: read, errors } = checkDocument(document);
    expect(read).toBeNull();
    const there = errors.filter((error) => error.path === path).map((error) => error.message);
    expect(there.join(' '), JSON.stringify(errors)).toContain(word);
  });

  it('has a way to break for each of at least thirty rules', () => {
    expect(
      new Set(brokenDocuments().map(({ path, word }) => `${path} ${word}`)).size,
    ).toBeGreaterThan(30);
  });
});
