import type { Findings } from './findings.ts';
import type { ListName } from './formedDocument.ts';

/** Warnings of one kind that are told one by one; a hundred alike would hide all others. */
const MOST_NAMED = 20;

/** Warnings of one kind about entries of one list: the first are told one by one, the rest as a number. */
export class CappedWarnings {
  private readonly findings: Findings;
  private readonly list: ListName;
  /** The sentence about the rest. */
  private readonly sentenceOf: (more: number) => string;
  private count = 0;

  constructor(findings: Findings, list: ListName, sentenceOf: (more: number) => string) {
    this.findings = findings;
    this.list = list;
    this.sentenceOf = sentenceOf;
  }

  warn(
    place: number,
    entry: { readonly id: string; readonly name?: string | undefined },
    sentence: string,
  ): void {
    this.count += 1;
    if (this.count <= MOST_NAMED) this.findings.about(this.list, place, entry).warn('', sentence);
  }

  /** Once all have been found. */
  finish(): void {
    const more = this.count - MOST_NAMED;
    if (more > 0) this.findings.warn(this.list, this.sentenceOf(more));
  }
}
