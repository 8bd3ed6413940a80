import type { Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { checkMassPlanarity } from './masses.ts';
import { checkNodeReference } from './nodes.ts';
import type { UnknownSet } from './reducedSet.ts';

/** Operating states name masses, nodes and supports that exist, and leave the frame some mass. */
export function checkStates(document: FormedDocument, set: UnknownSet, findings: Findings): void {
  const bare = document.members.entries.length === 0 && document.masses.entries.length > 0;
  document.states.entries.forEach((state, place) => {
    if (!state) return;
    const about = findings.about('states', place, state);
    const removed = new Set<string>();
    for (const [id, change] of Object.entries(state.masses)) {
      const path = `masses.${id}`;
      if (!document.masses.has(id)) {
        about.refuse(path, `mass “${id}” does not exist. Choose one of the masses.`);
      }
      if (change.present === false) removed.add(id);
      if (change.node !== undefined) {
        checkNodeReference(document, change.node, `${path}.node`, 'node', about);
      }
      if (set.reduced && change.offset) {
        checkMassPlanarity({ offset: change.offset }, set, about, `${path}.`);
      }
    }
    if (bare && document.masses.keys.every((key) => key !== undefined && removed.has(key))) {
      about.refuse('masses', 'it takes every mass away, so nothing is left to swing. Keep one.');
    }
    if (typeof state.supports === 'string') return;
    for (const node of Object.keys(state.supports)) {
      if (!document.supports.has(node)) {
        about.refuse(
          `supports.${node}`,
          `there is no support at node “${node}”. Choose one of the supports.`,
        );
      }
    }
  });
}
