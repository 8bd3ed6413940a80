import { memberParts, partDivider } from '../../frame/assembly/memberParts.ts';
import type { DividedPart, FrameModel } from '../../frame/assembly/FrameModel.ts';
import type { PlaneTensor } from '../../frame/elements/beamProperties.ts';
import { BEAM_DEFORMATIONS, beamDeformations } from '../../frame/elements/beamStiffness.ts';
import type { FrameDocument, Material, Member, Section } from '../../schemas/frameDocument.ts';
import type { ModeField } from './ModeFields.ts';
import type { ModePair } from './ModePair.ts';

/** Elements with the same matrices: one of them, and per pair of modes the sum of d_a d_bᵀ over all. */
interface Make {
  readonly part: DividedPart;
  readonly moments: readonly Float64Array[];
}

/** What may be changed in the members that an element form speaks of. */
export interface MemberChange {
  readonly section?: Section;
  readonly material?: Material;
  readonly member?: Member;
}

/**
 * φ_aᵀ(K − λM)φ_b of elements while their section, material or carried mass changes and the shapes stay: what element
 * displacements enter with is summed over all elements of one make first.
 */
export class ElementForms {
  readonly #model: FrameModel;
  readonly #fields: readonly ModeField[];
  readonly #pairs: readonly ModePair[];
  /** By make, section and material: other sections may have the same figures. */
  readonly #makes = new Map<string, Make>();

  constructor(model: FrameModel, fields: readonly ModeField[], pairs: readonly ModePair[]) {
    this.#model = model;
    this.#fields = fields;
    this.#pairs = pairs;
  }

  /** The form over all members that `chosen` accepts, as changed by `change`; one value per pair of modes. */
  of(chosen: (part: DividedPart) => boolean, change: MemberChange): Float64Array {
    const result = new Float64Array(this.#pairs.length);
    for (const make of this.#makesOf(chosen)) this.#add(make, change, result);
    return result;
  }

  /** The same of one member alone, which need not be like the others of its make. */
  ofMember(part: DividedPart, change: MemberChange): Float64Array {
    const result = new Float64Array(this.#pairs.length);
    this.#add({ part, moments: this.#momentsOf([part]) }, change, result);
    return result;
  }

  #add({ part, moments }: Make, change: MemberChange, result: Float64Array): void {
    const { stiffness, mass } = changedPart(this.#model, part, change);
    this.#pairs.forEach(({ lambda }, p) => {
      const S = moments[p]!;
      let sum = 0;
      for (let i = 0; i < S.length; i++) sum += (stiffness[i]! - lambda * mass[i]!) * S[i]!;
      result[p]! += sum;
    });
  }

  #makesOf(chosen: (part: DividedPart) => boolean): Make[] {
    const byMake = new Map<string, DividedPart[]>();
    for (const part of this.#model.parts) {
      if (!chosen(part)) continue;
      const key = JSON.stringify([part.make, part.member.section, part.member.material]);
      const parts = byMake.get(key);
      if (parts) parts.push(part);
      else byMake.set(key, [part]);
    }
    return [...byMake].map(([key, parts]) => {
      let known = this.#makes.get(key);
      if (known === undefined) {
        known = { part: parts[0]!, moments: this.#momentsOf(parts) };
        this.#makes.set(key, known);
      }
      return known;
    });
  }

  #momentsOf(parts: readonly DividedPart[]): Float64Array[] {
    const size = Math.sqrt(parts[0]!.stiffness.length);
    return this.#pairs.map(({ a, b }) => {
      const S = new Float64Array(size * size);
      for (const { index, divisions } of parts) {
        addMoments(this.#fields[a]!.stations[index]!, this.#fields[b]!.stations[index]!, {
          divisions,
          size,
          S,
        });
      }
      return S;
    });
  }
}

/** S += Σ d_a d_bᵀ over the elements of one member; `size` displacements an element. */
function addMoments(
  ofA: Float64Array,
  ofB: Float64Array,
  { divisions, size, S }: { divisions: number; size: number; S: Float64Array },
): void {
  for (let e = 0; e < divisions; e++) {
    const from = (e * size) / 2;
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) S[i * size + j]! += ofA[from + i]! * ofB[from + j]!;
    }
  }
}

/**
 * φ_aᵀ(K − λM)φ_b of one member whose stations move so. Strain energy comes from deformations: a member that is carried
 * along would else lose what deforms it in rounding.
 */
export function memberForm(
  part: DividedPart,
  ofA: Float64Array,
  ofB: Float64Array,
  lambda: number,
): number {
  const { divisions, mass } = part;
  const size = Math.sqrt(mass.length);
  let sum = 0;
  for (let e = 0; e < divisions; e++) {
    const from = (e * size) / 2;
    const [a, b] = [ofA.subarray(from, from + size), ofB.subarray(from, from + size)];
    sum += strainForm(part, a, b);
    for (let i = 0; i < size; i++) {
      let force = 0;
      for (let j = 0; j < size; j++) force += mass[i * size + j]! * b[j]!;
      sum -= lambda * a[i]! * force;
    }
  }
  return sum;
}

/** d_aᵀ k d_b of one element. */
function strainForm(
  { member, rigidity, segmentLength }: DividedPart,
  a: Float64Array,
  b: Float64Array,
): number {
  const { axial, torsion, bending, sway } = rigidity;
  if (member.kind === 'bar') return axial * (a[3]! - a[0]!) * (b[3]! - b[0]!);
  const g = new Float64Array(BEAM_DEFORMATIONS);
  const h = new Float64Array(BEAM_DEFORMATIONS);
  beamDeformations(a, segmentLength, g);
  beamDeformations(b, segmentLength, h);
  const planes = ({ vv, vw, ww }: PlaneTensor, v: number): number =>
    vv * g[v]! * h[v]! + vw * (g[v]! * h[v + 1]! + g[v + 1]! * h[v]!) + ww * g[v + 1]! * h[v + 1]!;
  return axial * g[0]! * h[0]! + torsion * g[1]! * h[1]! + planes(bending, 2) + planes(sway, 4);
}

/** A member resolved and divided as it is in the model, with something of it changed. */
function changedPart(model: FrameModel, part: DividedPart, change: MemberChange): DividedPart {
  const { document, massKind } = model;
  const { member = part.member, section, material } = change;
  const [changed] = memberParts({
    ...document,
    nodes: nodesOf(model, [part.member]),
    members: [member],
    ...(section && { sections: [section] }),
    ...(material && { materials: [material] }),
  });
  return partDivider(massKind)(changed!, part.divisions);
}

/** The nodes at the ends of some members. */
export function nodesOf(
  { document, nodeIndex }: FrameModel,
  members: readonly Member[],
): FrameDocument['nodes'] {
  const ids = new Set(members.flatMap(({ start, end }) => [start, end]));
  return [...ids].map((id) => document.nodes[nodeIndex.get(id)!]!);
}
