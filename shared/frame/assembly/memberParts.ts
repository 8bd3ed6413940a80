import type {
  FrameDocument,
  Material,
  Member,
  SectionShape,
  Vector3,
} from '../../schemas/frameDocument.ts';
import type { BeamProperties } from '../elements/beamProperties.ts';
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
  const shared = new Map<string, BeamProperties>();
  return document.members.map((member, index) => {
    const start = endOf(at.get(member.start)!, member.startArm);
    const end = endOf(at.get(member.end)!, member.endArm);
    const { material, section, theory, massPerLength } = member;
    const key = JSON.stringify([material, section, theory, massPerLength]);
    let properties = shared.get(key);
    if (properties === undefined) {
      properties = memberProperties(member, materials.get(material)!, sections.get(section)!.shape);
      shared.set(key, properties);
    }
    return { index, member, start, end, axes: memberAxes(start, end, member.roll), properties };
  });
}

function endOf(node: Vector3, arm: Vector3 | undefined): Vector3 {
  return arm ? add(node, arm) : node;
}

function memberProperties(
  { massPerLength, theory }: Member,
  material: Material,
  shape: SectionShape,
): BeamProperties {
  const { A, Iy, Iz, Iyz, J, ky, kz } = sectionProperties(shape, poissonRatio(material));
  return {
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
    massPerLength,
    theory,
  };
}

/** Significant digits to which two lengths are the same: what subtracting coordinates leaves. */
const SAME_LENGTH_DIGITS = 13;

/** Matrices of one element: what all members of one make share. */
type ElementMatrices = Pick<DividedPart, 'make' | 'rigidity' | 'stiffness' | 'mass'>;

/**
 * Divides members into equal elements; a bar is always one. Elements of one section, material and length
 * are worked out once and shared.
 */
export function partDivider(
  massKind: MassKind,
): (part: MemberPart, divisions: number) => DividedPart {
  const makes = new Map<string, ElementMatrices>();
  const keys = new Map<BeamProperties, string>();
  return (part, divisions) => {
    const { member, properties, axes } = part;
    const count = member.kind === 'bar' ? 1 : divisions;
    const segmentLength = axes.length / count;
    let shared = keys.get(properties);
    if (shared === undefined) {
      shared = JSON.stringify(properties);
      keys.set(properties, shared);
    }
    const key = `${member.kind} ${segmentLength.toPrecision(SAME_LENGTH_DIGITS)} ${shared}`;
    let matrices = makes.get(key);
    if (matrices === undefined) {
      matrices = elementMatrices(part, segmentLength, massKind, makes.size);
      makes.set(key, matrices);
    }
    const { make, rigidity, stiffness, mass } = matrices;
    const { index, start, end } = part;
    return {
      index,
      member,
      axes,
      start,
      end,
      properties,
      divisions: count,
      segmentLength,
      make,
      rigidity,
      stiffness,
      mass,
    };
  };
}

function elementMatrices(
  { member, properties }: MemberPart,
  length: number,
  massKind: MassKind,
  make: number,
): ElementMatrices {
  const rigidity = beamRigidity(properties, length);
  const isBar = member.kind === 'bar';
  const massOf = {
    bar: { consistent: barConsistentMass, lumped: barLumpedMass },
    beam: { consistent: beamConsistentMass, lumped: beamLumpedMass },
  }[member.kind][massKind];
  return {
    make,
    rigidity,
    stiffness: isBar ? barStiffness(rigidity.axial) : beamStiffness(rigidity, length),
    mass: massOf(properties, length),
  };
}
