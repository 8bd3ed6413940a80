import { useCallback, useEffect, useMemo, useRef, type RefObject } from 'react';
import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import type { CameraStore, ViewSize } from '../camera/cameraStore.ts';
import { makeProjection, type Projection } from '../camera/projection.ts';
import type { Deformation } from '../Deformation.ts';
import { moveModel } from '../model/movedModel.ts';
import { drawSheet, type Sheet } from './drawSheet.ts';
import { placeBeside } from './placeBeside.ts';

interface Anchored {
  readonly at: Vector3;
  readonly element: RefObject<HTMLElement | null>;
}

/**
 * Draws the inked layer whenever what it shows, the camera or the size changes, at most once per screen frame, and
 * keeps the anchored element beside its point. In a moving mode it is drawn with every phase. Returns the ref of its canvas.
 */
export function useOverlay(
  camera: CameraStore,
  size: ViewSize,
  anchored: Anchored | undefined,
  content: Omit<Sheet, 'projection' | 'moved'>,
  deformation: Deformation | null,
): RefObject<HTMLCanvasElement | null> {
  const canvas = useRef<HTMLCanvasElement>(null);
  const draw = useRef<() => void>(() => {});
  const handle = useRef<number | null>(null);

  const request = useCallback(() => {
    handle.current ??= requestAnimationFrame(() => {
      handle.current = null;
      draw.current();
    });
  }, []);

  const { model } = content;
  const move = useMemo(() => deformation && moveModel(model, deformation), [model, deformation]);

  useEffect(() => {
    draw.current = () => {
      const projection = makeProjection(camera.get(), size);
      const moved = move && deformation ? move(Math.cos(deformation.clock.phase.current)) : null;
      drawOn(canvas.current, { ...content, projection, moved });
      placeAnchored(anchored, projection);
    };
    request();
  });
  useEffect(() => camera.subscribe(request), [camera, request]);
  useEffect(() => deformation?.clock.onPhase(request), [deformation, request]);
  // Names are drawn in the application's own type, which may arrive after the first drawing.
  useEffect(() => {
    void document.fonts?.ready.then(request);
  }, [request]);
  useEffect(
    () => () => {
      if (handle.current !== null) cancelAnimationFrame(handle.current);
      handle.current = null;
    },
    [],
  );
  return canvas;
}

function drawOn(canvas: HTMLCanvasElement | null, sheet: Sheet): void {
  const pen = canvas?.getContext('2d');
  if (!canvas || !pen) return;
  const { width, height } = sheet.projection.size;
  const density = window.devicePixelRatio || 1;
  const across = Math.round(width * density);
  const down = Math.round(height * density);
  // Setting either clears the canvas and its state, so only when it differs.
  if (canvas.width !== across) canvas.width = across;
  if (canvas.height !== down) canvas.height = down;
  pen.setTransform(density, 0, 0, density, 0, 0);
  drawSheet(pen, sheet);
}

function placeAnchored(anchored: Anchored | undefined, projection: Projection): void {
  const element = anchored?.element.current;
  if (!anchored || !element) return;
  const spot = projection.project(anchored.at);
  const { x, y } = placeBeside(
    spot,
    { width: element.offsetWidth, height: element.offsetHeight },
    projection.size,
  );
  element.style.transform = `translate(${Math.round(x)}px, ${Math.round(y)}px)`;
}
