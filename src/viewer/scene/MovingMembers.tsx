import { useFrame, useThree } from '@react-three/fiber';
import { useEffect, useMemo, useRef } from 'react';
import { LineSegments, Mesh, type ShaderMaterial } from 'three';
import type { Deformation } from '../Deformation.ts';
import type { FrameModel } from '../model/frameModel.ts';
import type { Inks } from '../useInks.ts';
import { movingMaterial } from './inkMaterials.ts';
import { movingGeometry } from './movingGeometry.ts';

interface MovingMembersProps {
  readonly model: FrameModel;
  readonly deformation: Deformation;
  readonly inks: Inks;
}

/** The frame moving in one mode: the shape lies in the vertices, each frame sets one factor. */
export function MovingMembers({ model, deformation, inks }: MovingMembersProps) {
  const invalidate = useThree((state) => state.invalidate);
  const { shapes, mode, amplitude, clock } = deformation;
  const drawn = useMemo(() => {
    const { geometry, bodies } = movingGeometry(model, { shapes, mode, amplitude });
    const material = movingMaterial(inks, bodies);
    const object = bodies ? new Mesh(geometry, material) : new LineSegments(geometry, material);
    // The shader moves the vertices out of the box that would be tested.
    object.frustumCulled = false;
    return object;
  }, [model, shapes, mode, amplitude, inks]);
  const material = useRef<ShaderMaterial>(drawn.material);

  useEffect(() => {
    material.current = drawn.material;
    invalidate();
    return () => {
      drawn.geometry.dispose();
      drawn.material.dispose();
    };
  }, [drawn, invalidate]);
  useEffect(() => clock.onPhase(() => invalidate()), [clock, invalidate]);
  useFrame(() => {
    const factor = material.current.uniforms['factor'];
    if (factor) factor.value = Math.cos(clock.phase.current);
  });
  return <primitive object={drawn} />;
}
