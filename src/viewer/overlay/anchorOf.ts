import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import { add, scale } from '#shared/frame/vector3.ts';
import type { FrameModel } from '../model/frameModel.ts';
import type { Thing } from '../Selection.ts';

/** The point at which a thing is named and its details open, m; null where the thing is not placed. */
export function anchorOf(model: FrameModel, { list, id }: Thing): Vector3 | null {
  switch (list) {
    case 'nodes':
    case 'supports':
      return model.nodes.get(id) ?? null;
    case 'members': {
      const placed = model.members.find(({ member }) => member.id === id);
      return placed ? scale(add(placed.start, placed.end), 0.5) : null;
    }
    case 'masses':
      return model.masses.find(({ mass }) => mass.id === id)?.centre ?? null;
    case 'springs': {
      const spring = model.document.springs.find((entry) => entry.id === id);
      return spring ? middle(model, spring.start, spring.end) : null;
    }
    case 'rigidLinks': {
      const link = model.document.rigidLinks.find((entry) => entry.id === id);
      return link ? middle(model, link.main, link.others[0] ?? link.main) : null;
    }
  }
}

function middle(model: FrameModel, a: string, b: string): Vector3 | null {
  const from = model.nodes.get(a);
  const to = model.nodes.get(b);
  return from && to ? scale(add(from, to), 0.5) : null;
}
