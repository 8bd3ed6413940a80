import type { Issue } from '../errors/AppError.ts';
import type { FrameDocument } from '../schemas/frameDocument.ts';
import type { ModelWarning } from '../schemas/solveResult.ts';
import { checkCloseNodes } from './checks/closeNodes.ts';
import { checkRigidLinks, checkSprings } from './checks/connections.ts';
import { Findings } from './checks/findings.ts';
import type { FormedDocument, ListName } from './checks/formedDocument.ts';
import { checkIdleStiffness } from './checks/idleStiffness.ts';
import { checkMasses } from './checks/masses.ts';
import { checkMaterials } from './checks/materials.ts';
import { checkMembers } from './checks/members.ts';
import { checkMemberPairs } from './checks/memberPairs.ts';
import { checkDuplicates, checkNodes } from './checks/nodes.ts';
import { readForm } from './checks/readForm.ts';
import { unknownSet } from './checks/reducedSet.ts';
import { checkSections } from './checks/sections.ts';
import { checkStates } from './checks/states.ts';
import { checkSupports } from './checks/supports.ts';
import { checkUnitSlips } from './checks/unitSlips.ts';

export interface CheckedDocument {
  /** The document with every default filled in; null where anything is refused. */
  readonly document: FrameDocument | null;
  /** Every refusal at once: path such as `members.3.section`, and a sentence naming the thing and the remedy. */
  readonly errors: readonly Issue[];
  /** What does not stop a solve but should be known. */
  readonly warnings: readonly ModelWarning[];
}

/**
 * Reads a value from outside as a frame document and checks its form and its meaning.
 *   input    anything, such as parsed JSON
 *   purpose  `solve`, or `draft` for a document still being drawn, which may have no mass yet
 * Never throws. Where the form of an entry is wrong, the rules of meaning still run on all the others, so
 * that every refusal comes at once. Takes time in proportion to the document's size.
 */
export function checkDocument(
  input: unknown,
  purpose: 'solve' | 'draft' = 'solve',
): CheckedDocument {
  const { document, formed, issues } = readForm(input);
  if (!formed) return { document: null, errors: issues, warnings: [] };
  const findings = new Findings();
  checkMeaning(formed, purpose, findings);
  const errors = [...issues, ...findings.errors];
  return {
    document: errors.length === 0 ? document : null,
    errors,
    warnings: findings.warnings,
  };
}

const LISTS: readonly ListName[] = [
  'materials',
  'sections',
  'nodes',
  'members',
  'supports',
  'springs',
  'rigidLinks',
  'masses',
  'states',
];

function checkMeaning(
  document: FormedDocument,
  purpose: 'solve' | 'draft',
  findings: Findings,
): void {
  for (const list of LISTS) checkDuplicates(document, list, findings);
  const set = unknownSet(document);
  checkMaterials(document, findings);
  checkSections(document, findings);
  checkNodes(document, set, findings);
  checkMembers(document, set, findings);
  checkMemberPairs(document, findings);
  checkCloseNodes(document, findings);
  checkSupports(document, set, findings);
  checkSprings(document, set, findings);
  checkRigidLinks(document, findings);
  checkMasses(document, set, findings);
  checkStates(document, set, findings);
  checkIdleStiffness(document, set, findings);
  checkUnitSlips(document, set, findings);
  if (document.members.entries.length === 0 && document.masses.entries.length === 0) {
    const sentence = 'The frame has no mass, so nothing can swing. Add a member or a mass.';
    if (purpose === 'solve') findings.refuse('members', sentence);
    else findings.warn('members', sentence);
  }
}
