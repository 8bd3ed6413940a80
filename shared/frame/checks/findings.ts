import type { Issue } from '../../errors/AppError.ts';
import type { ModelWarning } from '../../schemas/solveResult.ts';
import type { ListName } from './formedDocument.ts';

const NOUN: Record<ListName, string> = {
  materials: 'Material',
  sections: 'Section',
  nodes: 'Node',
  members: 'Member',
  supports: 'Support at node',
  springs: 'Spring',
  rigidLinks: 'Rigid link',
  masses: 'Mass',
  states: 'Operating state',
};

/** How a sentence calls an entry: “Member leg 2 (“m2”)”, “Support at node “n1””, or its number in the list. */
export function callEntry(
  list: ListName,
  place: number,
  key: string | undefined,
  name: string | undefined,
): string {
  if (key === undefined) {
    return list === 'supports'
      ? `Support number ${place + 1}`
      : `${NOUN[list]} number ${place + 1}`;
  }
  if (name === undefined || name === '' || name === key) return `${NOUN[list]} “${key}”`;
  return `${NOUN[list]} ${name} (“${key}”)`;
}

/** An entry within a sentence: “member leg 2 (“m2”)”. */
export function mentionEntry(
  list: ListName,
  entry: { readonly id: string; readonly name?: string | undefined },
): string {
  return lowerFirst(callEntry(list, 0, entry.id, entry.name));
}

export function lowerFirst(sentence: string): string {
  return `${sentence.charAt(0).toLowerCase()}${sentence.slice(1)}`;
}

/** Collects what is wrong with a document (refusals) and what a person should know (warnings). */
export class Findings {
  readonly errors: Issue[] = [];
  readonly warnings: ModelWarning[] = [];

  refuse(path: string, message: string): void {
    this.errors.push({ path, message });
  }

  warn(path: string, message: string): void {
    this.warnings.push({ path, message });
  }

  /** Refuses or warns about one entry: the sentence begins with what the entry is called. */
  about(
    list: ListName,
    place: number,
    entry: { readonly id?: string; readonly node?: string; readonly name?: string | undefined },
  ): EntryFindings {
    const key = list === 'supports' ? entry.node : entry.id;
    return new EntryFindings(
      this,
      `${list}.${place}`,
      callEntry(list, place, key, list === 'supports' ? undefined : entry.name),
    );
  }
}

/** Findings about one entry; `field` is a path inside it, empty for the entry as a whole. */
export class EntryFindings {
  private readonly findings: Findings;
  private readonly path: string;
  private readonly subject: string;

  constructor(findings: Findings, path: string, subject: string) {
    this.findings = findings;
    this.path = path;
    this.subject = subject;
  }

  refuse(field: string, sentence: string): void {
    this.findings.refuse(this.at(field), `${this.subject}: ${sentence}`);
  }

  warn(field: string, sentence: string): void {
    this.findings.warn(this.at(field), `${this.subject}: ${sentence}`);
  }

  private at(field: string): string {
    return field === '' ? this.path : `${this.path}.${field}`;
  }
}
