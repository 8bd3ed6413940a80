import type { Displacement, FrameDocument, Member, Vector3 } from '../../schemas/frameDocument.ts';
import type { BeamProperties } from '../elements/beamProperties.ts';
import type { BeamRigidity } from '../elements/beamStiffness.ts';
import type { Combination } from '../freedoms/Combination.ts';
import type { Row } from '../freedoms/rowSpace.ts';
import type { MemberAxes } from '../memberAxes.ts';

export type MassKind = 'consistent' | 'lumped';

/** A member with its geometry and material resolved: what all its elements share. */
export interface MemberPart {
  /** Place in `document.members`. */
  readonly index: number;
  readonly member: Member;
  readonly axes: MemberAxes;
  /** The member's own ends, arms included [m]. */
  readonly start: Vector3;
  readonly end: Vector3;
  readonly properties: BeamProperties;
}

/** One element: a stretch of a beam between neighbouring stations, or a whole bar. */
export interface Segment {
  readonly part: DividedPart;
  /** 0 at the member's start. */
  readonly number: number;
  /** Displacements of its ends in member axes: 12 of a beam, 6 (translations) of a bar. */
  readonly motion: Combination;
}

/**
 * Some neighbouring elements of one member: what lies between its ends is eliminated once for all chains
 * of one make. A short member is one chain, a bar too; a long one several.
 */
export interface ModelChain {
  readonly part: DividedPart;
  /** Number of its first element, and how many it has. */
  readonly from: number;
  readonly elements: number;
  /** Displacements of its ends in member axes over the joint unknowns: 12 of a beam, 6 of a bar. */
  readonly ends: Combination;
  /** First of its inner unknowns; their order is that of `stationPlaces`. */
  readonly inner: number;
  /** What chains of its make share. */
  readonly make: ChainMake;
}

/** How the unknowns of a chain are ordered, alike for all chains of one make. */
export interface ChainMake {
  /**
   * Displacements in member axes (0–5) by parts that the element matrices do not couple: stretch, twist,
   * bending in each plane, as far as the section allows.
   */
  readonly blocks: readonly (readonly number[])[];
  /** Displacements that inner stations have in this model. */
  readonly exists: readonly boolean[];
  /** Number of inner unknowns. */
  readonly inner: number;
  /**
   * Per station, first to last: place of each displacement among the inner unknowns, then the ends; block by
   * block. −1 for one that does not exist.
   */
  readonly places: readonly Int32Array[];
}

/** A member divided into equal elements. */
export interface DividedPart extends MemberPart {
  readonly divisions: number;
  /** Number that elements with the same matrices share. */
  readonly make: number;
  /** Length of one element [m]. */
  readonly segmentLength: number;
  readonly rigidity: BeamRigidity;
  /** Stiffness and mass matrix of one element in member axes, row by row. */
  readonly stiffness: Float64Array;
  readonly mass: Float64Array;
}

/** One scalar stiffness: a displacement of a joint, a support or a spring. */
export interface Tie {
  readonly owner: 'joint' | 'support' | 'spring';
  /** Member and end of a joint, node of a support, id of a spring. */
  readonly id: string;
  /** Along the joint's, support's or spring's own axes. */
  readonly along: Displacement;
  /** One row: how far it is stretched [m] or turned [rad]. */
  readonly motion: Combination;
  /** [N/m] or [N·m/rad] */
  readonly stiffness: number;
  readonly turns: boolean;
}

/** A point mass carried rigidly by its node. */
export interface Body {
  /** Place in `document.masses`. */
  readonly index: number;
  /** Its centre of gravity [m]. */
  readonly at: Vector3;
  /** u v w rx ry rz of that centre in global axes. */
  readonly motion: Combination;
  /** 6×6 [kg, kg·m²] */
  readonly mass: Float64Array;
}

/** What one unknown is: a row over the scaled displacements of the rigid group that carries it. */
export interface UnknownMeaning {
  readonly group: number;
  readonly row: Row;
}

/** A displacement of a group that a support fixes or resists. */
export interface Hold {
  readonly group: number;
  readonly row: Row;
}

/** A frame as elements over its free unknowns: everything that K, M, energies and shapes are made from. */
export interface FrameModel {
  readonly document: FrameDocument;
  readonly massKind: MassKind;
  /** Number of free unknowns: those of joints first, then those inside chains, make by make. */
  readonly free: number;
  readonly joints: number;
  /** joints: number of the node, joint or station inside a member that each belongs to. */
  readonly blockOf: Int32Array;
  /** Chains of one make, which differ in where they stand alone. */
  readonly chains: readonly (readonly ModelChain[])[];
  /** [m], a power of two: group rotations are unknowns as length × angle, so that all are metres. */
  readonly scale: number;
  /** 6, global order: 1 where the displacement exists in this model. */
  readonly exists: Uint8Array;
  readonly parts: readonly DividedPart[];
  /** Every element by itself, worked out when first asked for. */
  readonly segments: readonly Segment[];
  readonly ties: readonly Tie[];
  readonly bodies: readonly Body[];
  /** Place of each node in `document.nodes`, by id. */
  readonly nodeIndex: ReadonlyMap<string, number>;
  /** u v w rx ry rz of every node in global axes. */
  readonly nodes: readonly Combination[];
  /** Of the joint unknowns. */
  readonly meanings: readonly UnknownMeaning[];
  readonly holds: readonly Hold[];
  /** Rigid group of each node, reference point and component of each group. */
  readonly groupOf: Int32Array;
  readonly reference: readonly Vector3[];
  readonly componentOf: Int32Array;
  readonly components: number;
}
