import type { z } from 'zod';

import type { Issue } from '../../errors/AppError.ts';
import {
  frameDocument,
  material,
  member,
  node,
  operatingState,
  pointMass,
  rigidLink,
  section,
  spring,
  support,
  unknowns,
  UNKNOWN_SETS,
  type FrameDocument,
} from '../../schemas/frameDocument.ts';
import { callEntry } from './findings.ts';
import { FormedList, wholeDocument, type FormedDocument, type ListName } from './formedDocument.ts';

/** The outcome of reading a document's form; `document` is null where the form has any fault. */
export interface FormReading {
  readonly document: FrameDocument | null;
  /** What could be read, for the rules of meaning; null where the input is no object at all. */
  readonly formed: FormedDocument | null;
  readonly issues: readonly Issue[];
}

/** Reads an unknown value as a frame document, defaults filled in, keeping what is well formed of it. */
export function readForm(input: unknown): FormReading {
  const reading = frameDocument.safeParse(input, { error: formSentence });
  if (reading.success) {
    return { document: reading.data, formed: wholeDocument(reading.data), issues: [] };
  }
  const fields = asRecord(input);
  return {
    document: null,
    formed: fields ? partialDocument(fields) : null,
    issues: reading.error.issues.flatMap((issue) => formIssues(issue, fields)),
  };
}

type RawIssue = z.core.$ZodRawIssue;

/** Plain sentences for faults of form that the schema itself has no sentence for. */
function formSentence(issue: RawIssue): string | undefined {
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined
        ? 'This is missing.'
        : `This must be ${TYPE_WORDS[issue.expected] ?? issue.expected}.`;
    case 'invalid_value':
      return `This must be ${issue.values.map((value) => `“${String(value)}”`).join(' or ')}.`;
    case 'invalid_union':
      return issue.discriminator === undefined
        ? 'This has none of the forms that are possible here.'
        : 'Choose one of the kinds that exist.';
    case 'too_big':
      return issue.origin === 'string'
        ? `At most ${issue.maximum} characters.`
        : `At most ${issue.maximum}.`;
    case 'too_small':
      return issue.origin === 'array'
        ? `At least ${issue.minimum} entries.`
        : `At least ${issue.minimum}.`;
    default:
      return undefined;
  }
}

const TYPE_WORDS: Partial<Record<string, string>> = {
  string: 'text',
  number: 'a number',
  int: 'a whole number',
  boolean: 'true or false',
  object: 'an object with named fields',
  record: 'an object with named fields',
  array: 'a list',
  tuple: 'a list of three numbers',
};

/** One zod issue as ours: dotted path, and a sentence that begins with the entry it is about. */
function formIssues(issue: z.core.$ZodIssue, fields: Record<string, unknown> | null): Issue[] {
  const path = issue.path.map(String);
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({
      path: [...path, key].join('.'),
      message: `${callPlace(path, fields)}: the field “${key}” is not known. Remove it or correct its spelling.`,
    }));
  }
  return [{ path: path.join('.'), message: `${callPlace(path, fields)}: ${issue.message}` }];
}

function callPlace(path: readonly string[], fields: Record<string, unknown> | null): string {
  const [list, place, ...rest] = path;
  if (list === undefined) return 'The document';
  if (place === undefined || !isListName(list)) return `The document’s ${path.join('.')}`;
  const entries = fields?.[list];
  const entry = Array.isArray(entries) ? asRecord(entries[Number(place)]) : null;
  const called = callEntry(
    list,
    Number(place),
    textOf(entry, list === 'supports' ? 'node' : 'id'),
    list === 'supports' ? undefined : textOf(entry, 'name'),
  );
  return rest.length === 0 ? called : `${called}, ${rest.join('.')}`;
}

const ENTRY_SCHEMAS = {
  materials: material,
  sections: section,
  nodes: node,
  members: member,
  supports: support,
  springs: spring,
  rigidLinks: rigidLink,
  masses: pointMass,
  states: operatingState,
} as const satisfies Record<ListName, z.ZodType>;

function isListName(list: string): list is ListName {
  return Object.hasOwn(ENTRY_SCHEMAS, list);
}

function partialDocument(fields: Record<string, unknown>): FormedDocument {
  const set = unknowns.safeParse(fields.unknowns);
  return {
    unknowns: set.success ? set.data : UNKNOWN_SETS[0],
    materials: partialList(fields.materials, material, 'id'),
    sections: partialList(fields.sections, section, 'id'),
    nodes: partialList(fields.nodes, node, 'id'),
    members: partialList(fields.members, member, 'id'),
    supports: partialList(fields.supports, support, 'node'),
    springs: partialList(fields.springs, spring, 'id'),
    rigidLinks: partialList(fields.rigidLinks, rigidLink, 'id'),
    masses: partialList(fields.masses, pointMass, 'id'),
    states: partialList(fields.states, operatingState, 'id'),
  };
}

function partialList<T>(raw: unknown, schema: z.ZodType<T>, key: 'id' | 'node'): FormedList<T> {
  const entries: unknown[] = Array.isArray(raw) ? raw : [];
  return new FormedList(
    entries.map((entry) => schema.safeParse(entry).data),
    entries.map((entry) => textOf(asRecord(entry), key)),
  );
}

function asRecord(value: unknown): Record<string, unknown> | null {
  return typeof value === 'object' && value !== null && !Array.isArray(value)
    ? (value as Record<string, unknown>)
    : null;
}

function textOf(entry: Record<string, unknown> | null, field: string): string | undefined {
  const value = entry?.[field];
  return typeof value === 'string' ? value : undefined;
}
