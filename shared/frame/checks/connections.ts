import { DISPLACEMENTS } from '../../schemas/frameDocument.ts';
import type { Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { checkNodeReference } from './nodes.ts';
import type { UnknownSet } from './reducedSet.ts';

/** Springs join two different nodes with some stiffness. */
export function checkSprings(document: FormedDocument, set: UnknownSet, findings: Findings): void {
  document.springs.entries.forEach((spring, place) => {
    if (!spring) return;
    const about = findings.about('springs', place, spring);
    checkNodeReference(document, spring.start, 'start', 'start node', about);
    checkNodeReference(document, spring.end, 'end', 'end node', about);
    if (spring.start === spring.end) {
      about.refuse('end', 'it starts and ends at the same node. Choose two different nodes.');
    }
    const sprung = DISPLACEMENTS.filter((d) => spring.stiffness[d] !== undefined);
    if (sprung.length === 0) {
      about.refuse('stiffness', 'it has no stiffness at all. Give it one, or remove the spring.');
    }
    const outside = DISPLACEMENTS.filter(
      (d) =>
        !set.has(d) && (spring.stiffness[d] !== undefined || spring.damping?.[d] !== undefined),
    );
    if (outside.length > 0) {
      about.warn(
        'stiffness',
        `what it does to ${outside.join(', ')} is ignored, since the unknowns are only ${set.words}.`,
      );
    }
  });
}

/** Rigid links join different, existing nodes. (A node may be in several links: they move as one body.) */
export function checkRigidLinks(document: FormedDocument, findings: Findings): void {
  document.rigidLinks.entries.forEach((link, place) => {
    if (!link) return;
    const about = findings.about('rigidLinks', place, link);
    checkNodeReference(document, link.main, 'main', 'main node', about);
    const seen = new Set<string>();
    link.others.forEach((other, i) => {
      checkNodeReference(document, other, `others.${i}`, 'node', about);
      if (other === link.main) {
        about.refuse(
          `others.${i}`,
          `node “${other}” is its main node too. Take it out of the others.`,
        );
      } else if (seen.has(other)) {
        about.refuse(`others.${i}`, `node “${other}” is listed twice. Name each node once.`);
      }
      seen.add(other);
    });
  });
}
