import type { DocumentList } from '#shared/frame/documentDiff.ts';
import { standardMaterials } from '#shared/frame/materials.ts';
import { squareTube } from '#shared/frame/shelf.ts';
import type {
  FrameDocument,
  Material,
  Member,
  Section,
  Vector3,
} from '#shared/schemas/frameDocument.ts';
import type { FrameCommand } from './command.ts';
import { freeId } from './lists.ts';

/** A new entry as a command, or why there can be none yet, in words. */
export type NewEntry = { readonly id: string; readonly command: FrameCommand } | string;

const TWO_NODES = 'This needs two nodes. Add nodes first.';

/** An entry of a list with plain first values, to be changed in its details. `node`: where it goes. */
export function newEntry(frame: FrameDocument, list: DocumentList, node?: string): NewEntry {
  const [first, second] = frame.nodes;
  switch (list) {
    case 'nodes':
      return newNode(frame, [0, 0, 0]);
    case 'members':
      return first && second ? newMember(frame, first.id, second.id) : TWO_NODES;
    case 'sections': {
      const entry = freshSection(frame);
      return { id: entry.id, command: { kind: 'add', list, entry } };
    }
    case 'materials': {
      const entry = freshMaterial(frame);
      return { id: entry.id, command: { kind: 'add', list, entry } };
    }
    case 'supports': {
      const free = frame.nodes.find(
        ({ id }) => !frame.supports.some((support) => support.node === id),
      );
      const id = node ?? free?.id;
      if (id === undefined) return 'Every node carries a support already, or there is no node yet.';
      const entry = {
        node: id,
        fixed: frame.unknowns.filter((one) => one === 'u' || one === 'v' || one === 'w'),
        bracket: { soft: 0.5, stiff: 2 },
      };
      return { id, command: { kind: 'add', list, entry } };
    }
    case 'springs': {
      if (!first || !second) return TWO_NODES;
      const id = freeId(frame, list, 'spring ');
      const entry = {
        id,
        start: first.id,
        end: second.id,
        stiffness: { [frame.unknowns[0] ?? 'u']: 1e6 },
      };
      return { id, command: { kind: 'add', list, entry } };
    }
    case 'rigidLinks': {
      if (!first || !second) return TWO_NODES;
      const id = freeId(frame, list, 'link ');
      const entry = { id, main: first.id, others: [second.id] };
      return { id, command: { kind: 'add', list, entry } };
    }
    case 'masses': {
      const at = node ?? first?.id;
      if (at === undefined) return 'A mass hangs on a node. Add a node first.';
      const id = freeId(frame, list, 'mass ');
      const offset: Vector3 = [0, 0, 0];
      const entry = { id, name: id, node: at, mass: 10, offset };
      return { id, command: { kind: 'add', list, entry } };
    }
    case 'states': {
      const id = freeId(frame, list, 'state ');
      const entry = { id, name: id, masses: {}, supports: 'expected' as const };
      return { id, command: { kind: 'add', list, entry } };
    }
  }
}

export function newNode(
  frame: FrameDocument,
  [x, y, z]: Vector3,
): { readonly id: string; readonly command: FrameCommand } {
  const id = freeId(frame, 'nodes', 'n');
  return { id, command: { kind: 'add', list: 'nodes', entry: { id, x, y, z } } };
}

/** A member like the one added last; a frame without sections or materials gets its first ones along. */
export function newMember(
  frame: FrameDocument,
  start: string,
  end: string,
): { readonly id: string; readonly command: FrameCommand } {
  const like = frame.members.at(-1);
  const commands: FrameCommand[] = [];
  const material = like?.material ?? frame.materials[0]?.id;
  const section = like?.section ?? frame.sections[0]?.id;
  const ownMaterial = freshMaterial(frame);
  const ownSection = freshSection(frame);
  if (material === undefined) {
    commands.push({ kind: 'add', list: 'materials', entry: ownMaterial });
  }
  if (section === undefined) commands.push({ kind: 'add', list: 'sections', entry: ownSection });
  const id = freeId(frame, 'members', 'member ');
  const entry: Member = {
    id,
    kind: like?.kind ?? 'beam',
    start,
    end,
    material: material ?? ownMaterial.id,
    section: section ?? ownSection.id,
    roll: 0,
    divisions: like?.divisions ?? 4,
    theory: like?.theory ?? 'timoshenko',
    massPerLength: 0,
  };
  commands.push({ kind: 'add', list: 'members', entry });
  return { id, command: { kind: 'batch', commands } };
}

function freshSection(frame: FrameDocument): Section {
  const section = squareTube(60, 4);
  return { ...section, id: idFor(frame, 'sections', section.id, 'section ') };
}

function freshMaterial(frame: FrameDocument): Material {
  const taken = new Set(frame.materials.map(({ id }) => id));
  const standard = standardMaterials();
  const material = standard.find(({ id }) => !taken.has(id)) ?? standard[0];
  if (!material) throw new Error('There are no standard materials.');
  return { ...material, id: idFor(frame, 'materials', material.id, 'material ') };
}

function idFor(
  frame: FrameDocument,
  list: 'sections' | 'materials',
  id: string,
  stem: string,
): string {
  return frame[list].some((entry) => entry.id === id) ? freeId(frame, list, stem) : id;
}
