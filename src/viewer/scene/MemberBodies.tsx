import { useThree } from '@react-three/fiber';
import { useEffect, useMemo } from 'react';
import {
  InstancedBufferAttribute,
  InstancedBufferGeometry,
  LineSegments,
  Mesh,
  type BufferGeometry,
  type ShaderMaterial,
} from 'three';
import { sectionOutline } from '#shared/frame/sectionOutline.ts';
import type { Section } from '#shared/schemas/frameDocument.ts';
import type { PlacedMember } from '../model/frameModel.ts';
import type { Inks } from '../useInks.ts';
import { edgeMaterial, faceMaterial } from './inkMaterials.ts';
import { memberPlaces } from './memberPlaces.ts';
import { sectionPrism } from './sectionPrism.ts';

/** Straight pieces per quarter circle: enough on screen. */
const CORNER_PIECES = 4;

interface MemberBodiesProps {
  readonly members: readonly PlacedMember[];
  readonly chosen: ReadonlySet<string>;
  readonly inks: Inks;
}

/** Every member in its true section: one instanced prism, and its drawn edges, per section. */
export function MemberBodies({ members, chosen, inks }: MemberBodiesProps) {
  const faces = useMemo(() => faceMaterial(inks), [inks]);
  const edges = useMemo(() => edgeMaterial(inks), [inks]);
  useEffect(() => () => faces.dispose(), [faces]);
  useEffect(() => () => edges.dispose(), [edges]);
  const groups = useMemo(() => bySection(members), [members]);
  return groups.map(({ section, members: own }) => (
    <SectionBodies
      key={section.id}
      section={section}
      members={own}
      chosen={chosen}
      faces={faces}
      edges={edges}
    />
  ));
}

interface SectionBodiesProps {
  readonly section: Section;
  readonly members: readonly PlacedMember[];
  readonly chosen: ReadonlySet<string>;
  readonly faces: ShaderMaterial;
  readonly edges: ShaderMaterial;
}

function SectionBodies({ section, members, chosen, faces, edges }: SectionBodiesProps) {
  const invalidate = useThree((state) => state.invalidate);
  const prism = useMemo(
    () => sectionPrism(sectionOutline(section.shape, CORNER_PIECES)),
    [section.shape],
  );
  const drawn = useMemo(() => {
    const places = new InstancedBufferAttribute(memberPlaces(members), 16);
    const marks = new Float32Array(members.map(({ member }) => (chosen.has(member.id) ? 1 : 0)));
    const body = new Mesh(instanced(prism.faces, members.length), faces);
    const outline = new LineSegments(instanced(prism.edges, members.length), edges);
    body.geometry.setAttribute('place', places);
    body.geometry.setAttribute('chosen', new InstancedBufferAttribute(marks, 1));
    outline.geometry.setAttribute('place', places);
    // The prism of length 1 says nothing of where its instances are.
    body.frustumCulled = false;
    outline.frustumCulled = false;
    return { body, outline };
  }, [prism, members, chosen, faces, edges]);

  useEffect(() => {
    invalidate();
    return () => {
      drawn.body.geometry.dispose();
      drawn.outline.geometry.dispose();
    };
  }, [drawn, invalidate]);
  useEffect(
    () => () => {
      prism.faces.dispose();
      prism.edges.dispose();
    },
    [prism],
  );
  return (
    <>
      <primitive object={drawn.body} />
      <primitive object={drawn.outline} />
    </>
  );
}

function instanced(source: BufferGeometry, count: number): InstancedBufferGeometry {
  const geometry = new InstancedBufferGeometry();
  geometry.setIndex(source.getIndex());
  for (const [name, attribute] of Object.entries(source.attributes)) {
    geometry.setAttribute(name, attribute);
  }
  geometry.instanceCount = count;
  return geometry;
}

function bySection(members: readonly PlacedMember[]) {
  const groups = new Map<string, { section: Section; members: PlacedMember[] }>();
  for (const placed of members) {
    if (!placed.section) continue;
    const group = groups.get(placed.section.id);
    if (group) group.members.push(placed);
    else groups.set(placed.section.id, { section: placed.section, members: [placed] });
  }
  return [...groups.values()];
}
