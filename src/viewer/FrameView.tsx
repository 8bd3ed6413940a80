import {
  lazy,
  Suspense,
  useEffect,
  useId,
  useLayoutEffect,
  useMemo,
  useRef,
  useState,
  type ReactNode,
  type RefObject,
} from 'react';
import type { FrameDocument, Vector3 } from '#shared/schemas/frameDocument.ts';
import { cameraKey } from './camera/cameraKeys.ts';
import { createCameraStore, type CameraStore } from './camera/cameraStore.ts';
import { makeProjection } from './camera/projection.ts';
import { useCameraGestures } from './camera/useCameraGestures.ts';
import type { Deformation } from './Deformation.ts';
import { describeFrame } from './describeFrame.ts';
import { frameModel } from './model/frameModel.ts';
import { nameIn, type Pointing } from './overlay/drawSheet.ts';
import { useOverlay } from './overlay/useOverlay.ts';
import { pick } from './pick.ts';
import { pointUnder, type PointedAt } from './pointUnder.ts';
import { drawsBodies, hasWebGl } from './scene/drawsBodies.ts';
import { sameThing, type Thing } from './Selection.ts';
import { useInks } from './useInks.ts';
import { useViewSize } from './useViewSize.ts';
import { ViewBar } from './ViewBar.tsx';

const Scene = lazy(() => import('./scene/Scene.tsx'));

const NOTHING: readonly Thing[] = [];
const inMetres = (metres: number): string => `${Number(metres.toPrecision(3))} m`;

interface FrameViewProps {
  readonly document: FrameDocument;
  /** Hand the same store to several views to lock them to each other. */
  readonly camera?: CameraStore;
  readonly selected?: readonly Thing[];
  /** `add`: Shift was held. null: a click on nothing. */
  readonly onSelect?: (thing: Thing | null, add: boolean) => void;
  readonly onHover?: (thing: Thing | null) => void;
  /** Names beside nodes, members and masses. */
  readonly names?: boolean;
  readonly memberAxes?: boolean;
  /** Shows a moving mode instead of the frame at rest. */
  readonly deformation?: Deformation | null;
  /** While set, a click chooses a node or a grid point instead of selecting. */
  readonly pointing?: Pointing | null;
  readonly onPoint?: (at: PointedAt) => void;
  /** An element kept beside a point of the frame while the view moves. */
  readonly anchored?: { readonly at: Vector3; readonly element: RefObject<HTMLElement | null> };
  readonly formatLength?: (metres: number) => string;
  /** What the view shows, for those who do not see it; by default what the document holds. */
  readonly description?: string;
  /** More buttons for the strip above the view. */
  readonly tools?: ReactNode;
  /** Leaves the strip out, for views beside a locked one that has it. */
  readonly bare?: boolean;
  /** Stands on the view: title block, details. */
  readonly children?: ReactNode;
}

/**
 * The frame on its drawing sheet: parallel projection, members in their true section, everything else drawn over
 * them in ink. Still unless something changes. Keyboard: arrows turn (Shift: move), + and − zoom, F fits.
 */
export function FrameView({
  document,
  camera: sharedCamera,
  selected = NOTHING,
  onSelect,
  onHover,
  names = false,
  memberAxes = false,
  deformation = null,
  pointing = null,
  onPoint,
  anchored,
  formatLength = inMetres,
  description,
  tools,
  bare = false,
  children,
}: FrameViewProps) {
  const [ownCamera] = useState(() => createCameraStore());
  const camera = sharedCamera ?? ownCamera;
  const model = useMemo(() => frameModel(document), [document]);
  const inks = useInks();
  const view = useRef<HTMLDivElement>(null);
  const size = useViewSize(view);
  const [hovered, setHovered] = useState<Thing | null>(null);
  const [pointer, setPointer] = useState<Vector3 | null>(null);
  const keysId = useId();
  const bodies = drawsBodies(model);

  useLayoutEffect(() => {
    if (size.width > 1) camera.fitFirst(model.bounds, size);
  }, [camera, model, size]);

  const overlay = useOverlay(
    camera,
    size,
    anchored,
    {
      model,
      inks,
      selected,
      hovered,
      names,
      memberAxes,
      bodies,
      pointing,
      pointer: pointing ? pointer : null,
      formatLength,
    },
    deformation,
  );

  const pickAt = (x: number, y: number): Thing | null => {
    if (!onSelect && !onHover) return null;
    return pick(model, makeProjection(camera.get(), size), x, y);
  };
  const hover = (thing: Thing | null): void => {
    if (sameThing(thing, hovered)) return;
    setHovered(thing);
    onHover?.(thing);
  };
  const under = (x: number, y: number): PointedAt | null =>
    pointing && pointUnder(model, makeProjection(camera.get(), size), x, y, pointing);

  const handlers = useRef({
    onClick: (_x: number, _y: number, _shift: boolean) => {},
    onHover: (_x: number, _y: number) => {},
    onLeave: () => {},
  });
  useEffect(() => {
    handlers.current = {
      onClick: (x, y, shift) => {
        if (!pointing) {
          onSelect?.(pickAt(x, y), shift);
          return;
        }
        const at = under(x, y);
        if (at) onPoint?.(at);
      },
      onHover: (x, y) => {
        if (pointing) setPointer(under(x, y)?.at ?? null);
        hover(
          pointing ? pick(model, makeProjection(camera.get(), size), x, y, 'nodes') : pickAt(x, y),
        );
      },
      onLeave: () => {
        setPointer(null);
        hover(null);
      },
    };
  });
  useCameraGestures(view, camera, size, handlers);

  const said = description ?? describeFrame(document);
  return (
    <div className="flex h-full min-h-0 min-w-0 flex-col">
      {!bare && <ViewBar camera={camera} bounds={model.bounds} size={size} tools={tools} />}
      <div className="relative min-h-0 flex-1 overflow-hidden bg-sheet">
        <div
          ref={view}
          role="img"
          tabIndex={0}
          aria-label={said}
          aria-describedby={keysId}
          className={`absolute inset-0 touch-none ${pointing ? 'cursor-crosshair' : hovered ? 'cursor-pointer' : 'cursor-grab'}`}
          onKeyDown={(event) => {
            if (event.ctrlKey || event.metaKey || event.altKey) return;
            if (cameraKey(event, camera, model.bounds, size)) event.preventDefault();
          }}
        >
          {hasWebGl() && (bodies || deformation) && size.width > 1 && (
            <Suspense fallback={null}>
              <Scene
                model={model}
                camera={camera}
                inks={inks}
                selected={selected}
                bodies={bodies}
                deformation={deformation}
              />
            </Suspense>
          )}
          <canvas ref={overlay} className="absolute inset-0 size-full" />
        </div>
        <p id={keysId} className="sr-only">
          Arrow keys turn the view, with Shift they move it; plus and minus zoom; F fits the frame.
        </p>
        <p aria-live="polite" className="sr-only">
          {hovered ? nameIn(model, hovered) : ''}
        </p>
        {children}
      </div>
    </div>
  );
}
