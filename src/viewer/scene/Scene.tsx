import { Canvas } from '@react-three/fiber';
import { useMemo } from 'react';
import type { CameraStore } from '../camera/cameraStore.ts';
import type { Deformation } from '../Deformation.ts';
import type { FrameModel } from '../model/frameModel.ts';
import type { Thing } from '../Selection.ts';
import type { Inks } from '../useInks.ts';
import { CameraRig } from './CameraRig.tsx';
import { MemberBodies } from './MemberBodies.tsx';
import { MovingMembers } from './MovingMembers.tsx';

interface SceneProps {
  readonly model: FrameModel;
  readonly camera: CameraStore;
  readonly inks: Inks;
  readonly selected: readonly Thing[];
  readonly bodies: boolean;
  readonly deformation: Deformation | null;
}

/** What the graphics card draws: members with their section, or the frame moving in a mode. */
export default function Scene({ model, camera, inks, selected, bodies, deformation }: SceneProps) {
  const chosen = useMemo(
    () => new Set(selected.filter(({ list }) => list === 'members').map(({ id }) => id)),
    [selected],
  );
  return (
    <Canvas
      orthographic
      flat
      frameloop="demand"
      dpr={[1, 2]}
      gl={{ antialias: true, alpha: true }}
      style={{ position: 'absolute', inset: 0, pointerEvents: 'none' }}
      aria-hidden="true"
    >
      <CameraRig store={camera} reach={2 * model.size + 1} />
      {deformation ? (
        <MovingMembers model={model} deformation={deformation} inks={inks} />
      ) : (
        bodies && <MemberBodies members={model.members} chosen={chosen} inks={inks} />
      )}
    </Canvas>
  );
}
