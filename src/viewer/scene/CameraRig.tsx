import { useThree } from '@react-three/fiber';
import { useLayoutEffect } from 'react';
import { OrthographicCamera, Vector3 } from 'three';
import { makeProjection } from '../camera/projection.ts';
import type { CameraStore } from '../camera/cameraStore.ts';

/** Points the scene's camera where the store says and draws again when that changes. */
export function CameraRig({ store, reach }: { store: CameraStore; reach: number }) {
  const { camera, size, invalidate } = useThree();
  useLayoutEffect(() => {
    const follow = () => {
      if (!(camera instanceof OrthographicCamera)) return;
      aim(camera, store, size, reach);
      invalidate();
    };
    follow();
    return store.subscribe(follow);
  }, [camera, size, store, reach, invalidate]);
  return null;
}

function aim(
  camera: OrthographicCamera,
  store: CameraStore,
  size: { width: number; height: number },
  reach: number,
): void {
  const state = store.get();
  const { right, up, towards, pixelsPerMetre } = makeProjection(state, size);
  const distance = 2 * reach + state.span;
  camera.position.set(...state.target).addScaledVector(new Vector3(...towards), distance);
  camera.matrix.makeBasis(new Vector3(...right), new Vector3(...up), new Vector3(...towards));
  camera.quaternion.setFromRotationMatrix(camera.matrix);
  camera.zoom = pixelsPerMetre;
  camera.near = 0;
  camera.far = 2 * distance + 2 * reach;
  camera.updateProjectionMatrix();
  camera.updateMatrixWorld();
}
