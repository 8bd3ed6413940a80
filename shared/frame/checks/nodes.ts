import type { EntryFindings, Findings } from './findings.ts';
import type { FormedDocument, ListName } from './formedDocument.ts';
import { outOfPlane, type UnknownSet } from './reducedSet.ts';

/** Refuses the second and every further entry that has an id (for supports: a node) already taken. */
export function checkDuplicates(
  document: FormedDocument,
  list: ListName,
  findings: Findings,
): void {
  const seen = new Set<string>();
  const { keys } = document[list];
  keys.forEach((key, place) => {
    if (key === undefined) return;
    if (!seen.has(key)) {
      seen.add(key);
      return;
    }
    if (list === 'supports') {
      findings
        .about(list, place, { node: key })
        .refuse('node', 'this node already has a support. Put both into one.');
    } else {
      findings
        .about(list, place, { id: key })
        .refuse('id', 'this id is already taken in the same list. Give it another id.');
    }
  });
}

/** Refuses a reference to a node that does not exist. */
export function checkNodeReference(
  document: FormedDocument,
  node: string,
  field: string,
  word: string,
  about: EntryFindings,
): void {
  if (!document.nodes.has(node)) {
    about.refuse(field, `${word} “${node}” does not exist. Choose one of the nodes.`);
  }
}

/** Nodes lie in the plane or on the line of a reduced set, and something is attached to each. */
export function checkNodes(document: FormedDocument, set: UnknownSet, findings: Findings): void {
  const attached = attachedNodes(document);
  document.nodes.entries.forEach((node, place) => {
    if (!node) return;
    const about = findings.about('nodes', place, node);
    const off = outOfPlane(set, [node.x, node.y, node.z]);
    if (off !== '') {
      about.refuse(
        off.charAt(0).toLowerCase(),
        `with the unknowns ${set.words}, its ${off} has to be 0. Set it to 0, or choose all six unknowns.`,
      );
    }
    if (!attached.has(node.id)) {
      about.warn('', 'nothing is attached to it, so it plays no part.');
    }
  });
}

/** Ids of the nodes that a member, spring, link or mass names. */
export function attachedNodes(document: FormedDocument): Set<string> {
  const attached = new Set<string>();
  for (const member of document.members.entries) {
    if (member) attached.add(member.start).add(member.end);
  }
  for (const spring of document.springs.entries) {
    if (spring) attached.add(spring.start).add(spring.end);
  }
  for (const link of document.rigidLinks.entries) {
    if (!link) continue;
    attached.add(link.main);
    for (const other of link.others) attached.add(other);
  }
  for (const mass of document.masses.entries) if (mass) attached.add(mass.node);
  return attached;
}
