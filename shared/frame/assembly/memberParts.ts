import type { FrameDocument, Vector3 } from '../../schemas/frameDocument.ts';
import { memberAxes } from '../memberAxes.ts';
import { poissonRatio, shearModulus } from '../materialProperties.ts';
import { sectionProperties } from '../sectionProperties.ts';
import { add } from '../vector3.ts';
import { barConsistentMass, barLumpedMass, barStiffness } from '../elements/bar.ts';
import { beamConsistentMass, beamLumpedMass } from '../elements/beamMass.ts';
import { beamRigidity, beamStiffness } from '../elements/beamStiffness.ts';
import type { DividedPart, MassKind, MemberPart } from './FrameModel.ts';

/** Position of each node of a document [m]. */
export function nodePositions(document: FrameDocument): Map<string, Vector3> {
  return new Map(
    document.nodes.map((node): [string, Vector3] => [node.id, [node.x, node.y, node.z]]),
  );
}

/**
 * Every member of a document that `checkDocument` accepts, with its ends, axes and properties resolved.
 * The shear coefficients are those of the section at the material's Poisson's ratio.
 */
export function memberParts(document: FrameDocument): MemberPart[] {
  const at = nodePositions(document);
  const materials = new Map(document.materials.map((material) => [material.id, material]));
  const sections = new Map(document.sections.map((section) => [section.id, section]));
  return document.members.map((member, index) => {
    const start = add(at.get(member.start)!, member.startArm ?? [0, 0, 0]);
    const end = add(at.get(member.end)!, member.endArm ?? [0, 0, 0]);
    const material = materials.get(member.material)!;
    const { A, Iy, Iz, Iyz, J, ky, kz } = sectionProperties(
      sections.get(member.section)!.shape,
      poissonRatio(material),
    );
    return {
      index,
      member,
      start,
      end,
      axes: memberAxes(start, end, member.roll),
      properties: {
        E: material.E,
        G: shearModulus(material),
        rho: material.density,
        A,
        Iy,
        Iz,
        Iyz,
        J,
        ky,
        kz,
        massPerLength: member.massPerLength,
        theory: member.theory,
      },
    };
  });
}

/** The member divided into `divisions` equal elements; a bar is always one. */
export function dividePart(part: MemberPart, divisions: number, massKind: MassKind): DividedPart {
  const { member, properties, axes } = part;
  const isBar = member.kind === 'bar';
  const count = isBar ? 1 : divisions;
  const segmentLength = axes.length / count;
  const rigidity = beamRigidity(properties, segmentLength);
  const massOf = {
    bar: { consistent: barConsistentMass, lumped: barLumpedMass },
    beam: { consistent: beamConsistentMass, lumped: beamLumpedMass },
  }[member.kind][massKind];
  return {
    ...part,
    divisions: count,
    segmentLength,
    rigidity,
    stiffness: isBar ? barStiffness(rigidity.axial) : beamStiffness(rigidity, segmentLength),
    mass: massOf(properties, segmentLength),
  };
}
