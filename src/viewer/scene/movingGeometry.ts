import { BufferAttribute, BufferGeometry } from 'three';
import { sectionOutline } from '#shared/frame/sectionOutline.ts';
import type { SectionPoint } from '#shared/frame/sections/section.ts';
import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import type { Deformation } from '../Deformation.ts';
import type { FrameModel } from '../model/frameModel.ts';
import { modeScale } from '../model/movedModel.ts';
import { sampleMember, type MemberSamples } from './memberSamples.ts';

/** More members than this are drawn as lines: their sections would be a few px wide and slow to move. */
export const MOST_MOVING_BODIES = 400;
/** Rounded outlines are thinned to about this many points. */
const RING_POINTS = 16;

/** What moves: the geometry with attributes `position`, `swing`, `amount`, and whether it has faces. */
export interface MovingGeometry {
  readonly geometry: BufferGeometry;
  readonly bodies: boolean;
}

/** Lays one mode over the frame: bodies in their true section, or lines where there are many members. */
export function movingGeometry(
  model: FrameModel,
  { shapes, mode, amplitude }: Omit<Deformation, 'clock'>,
): MovingGeometry {
  const scale = modeScale(model, { shapes, mode, amplitude });
  const bodies = shapes.members.length <= MOST_MOVING_BODIES;
  const build = new Build();
  const placed = new Map(model.members.map((entry) => [entry.member.id, entry]));
  for (const stations of shapes.members) {
    const samples = sampleMember(shapes, mode, stations, scale);
    const own = placed.get(stations.id);
    if (bodies && own?.section) {
      const ringPoints = thinned(sectionOutline(own.section.shape).outer);
      build.body(samples, ringPoints, own.axes.y, own.axes.z, amplitude);
    } else build.line(samples, amplitude);
  }
  return { geometry: build.geometry(bodies), bodies };
}

function thinned(points: readonly SectionPoint[]): readonly SectionPoint[] {
  const every = Math.max(1, Math.ceil(points.length / RING_POINTS));
  return points.filter((_point, index) => index % every === 0);
}

/** Collects vertices and indices; a body is a ring of its section at every sample. */
class Build {
  private readonly position: number[] = [];
  private readonly normal: number[] = [];
  private readonly swing: number[] = [];
  private readonly amount: number[] = [];
  private readonly index: number[] = [];
  private readonly lineIndex: number[] = [];

  body(
    samples: MemberSamples,
    ring: readonly SectionPoint[],
    ey: Vector3,
    ez: Vector3,
    amplitude: number,
  ): void {
    const first = this.amount.length;
    for (let s = 0; s < samples.count; s += 1) {
      for (const [y, z] of ring) {
        const arm: Vector3 = [y * ey[0] + z * ez[0], y * ey[1] + z * ez[1], y * ey[2] + z * ez[2]];
        this.vertex(samples, s, arm, amplitude);
      }
    }
    const around = ring.length;
    for (let s = 0; s + 1 < samples.count; s += 1) {
      for (let i = 0; i < around; i += 1) {
        const a = first + s * around + i;
        const b = first + s * around + ((i + 1) % around);
        this.index.push(a, b, a + around, b, b + around, a + around);
      }
    }
  }

  line(samples: MemberSamples, amplitude: number): void {
    const first = this.amount.length;
    for (let s = 0; s < samples.count; s += 1) this.vertex(samples, s, [0, 0, 0], amplitude);
    for (let s = 0; s + 1 < samples.count; s += 1) this.lineIndex.push(first + s, first + s + 1);
  }

  /** A point `arm` off the sample's centroid: carried by the displacement and turned by the rotation there. */
  private vertex({ position, swing, turn }: MemberSamples, s: number, arm: Vector3, most: number) {
    const at = 3 * s;
    const [u, v, w] = [swing[at]!, swing[at + 1]!, swing[at + 2]!];
    const [rx, ry, rz] = [turn[at]!, turn[at + 1]!, turn[at + 2]!];
    this.position.push(
      position[at]! + arm[0],
      position[at + 1]! + arm[1],
      position[at + 2]! + arm[2],
    );
    this.swing.push(
      u + ry * arm[2] - rz * arm[1],
      v + rz * arm[0] - rx * arm[2],
      w + rx * arm[1] - ry * arm[0],
    );
    const reach = Math.hypot(...arm);
    this.normal.push(...(reach > 0 ? arm.map((value) => value / reach) : [0, 0, 1]));
    this.amount.push(most > 0 ? Math.min(1, Math.hypot(u, v, w) / most) : 0);
  }

  geometry(bodies: boolean): BufferGeometry {
    const geometry = new BufferGeometry();
    const set = (name: string, values: number[], size: number) =>
      geometry.setAttribute(name, new BufferAttribute(new Float32Array(values), size));
    set('position', this.position, 3);
    set('normal', this.normal, 3);
    set('swing', this.swing, 3);
    set('amount', this.amount, 1);
    geometry.setIndex(bodies ? this.index : this.lineIndex);
    return geometry;
  }
}
