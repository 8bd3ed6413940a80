import { applyState } from '#shared/frame/applyState.ts';
import { poissonRatio } from '#shared/frame/materialProperties.ts';
import { sectionProperties } from '#shared/frame/sectionProperties.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { frameModel } from '#src/viewer/model/frameModel.ts';

/** Mass of members, what they carry, and masses, in one operating state, kg. */
export function totalMass(frame: FrameDocument, stateId: string | null): number {
  const model = frameModel(applyState(frame, stateId));
  const materials = new Map(frame.materials.map((material) => [material.id, material]));
  const members = model.members.map(({ member, section, axes }) => {
    const material = materials.get(member.material);
    if (!section || !material) return 0;
    const { A } = sectionProperties(section.shape, poissonRatio(material));
    return (material.density * A + member.massPerLength) * axes.length;
  });
  const masses = model.masses.map(({ mass }) => mass.mass);
  return [...members, ...masses].reduce((sum, mass) => sum + mass, 0);
}
