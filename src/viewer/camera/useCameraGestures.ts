import { useEffect, type RefObject } from 'react';
import type { CameraStore, ViewSize } from './cameraStore.ts';

/** A full turn for a drag over this many px. */
const TURN_PX = 700;
/** Under this a press that moves is still a click, px. */
const CLICK_PX = 4;
const WHEEL_RATE = 0.0015;

interface GestureHandlers {
  onClick(x: number, y: number, shift: boolean): void;
  onHover(x: number, y: number): void;
  onLeave(): void;
}

/**
 * Pointer and wheel on the view: drag turns, drag with the right or middle button or with Shift moves, wheel and
 * pinch zoom, two fingers move. A press that stays in place is a click.
 */
export function useCameraGestures(
  element: RefObject<HTMLElement | null>,
  store: CameraStore,
  size: ViewSize,
  handlers: RefObject<GestureHandlers>,
): void {
  useEffect(() => {
    const view = element.current;
    if (!view) return undefined;
    const pointers = new Map<number, { x: number; y: number }>();
    let pressed: { x: number; y: number; moved: boolean } | null = null;

    const place = (event: { clientX: number; clientY: number }) => {
      const box = view.getBoundingClientRect();
      return { x: event.clientX - box.left, y: event.clientY - box.top };
    };
    const down = (event: PointerEvent) => {
      view.setPointerCapture(event.pointerId);
      const at = place(event);
      pointers.set(event.pointerId, at);
      pressed = pointers.size === 1 ? { ...at, moved: false } : null;
    };
    const move = (event: PointerEvent) => {
      const at = place(event);
      const before = pointers.get(event.pointerId);
      if (!before) {
        handlers.current.onHover(at.x, at.y);
        return;
      }
      if (pointers.size === 2) pinch(event.pointerId, before, at);
      else if (pressed) drag(event, before, at, pressed);
      if (pressed === null || pressed.moved || pointers.size === 2) {
        pointers.set(event.pointerId, at);
      }
    };
    const drag = (
      event: PointerEvent,
      before: { x: number; y: number },
      at: { x: number; y: number },
      press: { x: number; y: number; moved: boolean },
    ) => {
      if (!press.moved && Math.hypot(at.x - press.x, at.y - press.y) < CLICK_PX) return;
      press.moved = true;
      const dx = at.x - before.x;
      const dy = at.y - before.y;
      const moves = event.shiftKey || (event.buttons & 6) !== 0;
      if (moves) store.pan(dx, dy, size);
      else store.orbit((-dx * 2 * Math.PI) / TURN_PX, (dy * 2 * Math.PI) / TURN_PX);
    };
    const pinch = (id: number, before: { x: number; y: number }, at: { x: number; y: number }) => {
      const other = [...pointers].find(([key]) => key !== id)?.[1];
      if (!other) return;
      const apart = Math.hypot(before.x - other.x, before.y - other.y);
      const now = Math.hypot(at.x - other.x, at.y - other.y);
      store.pan((at.x - before.x) / 2, (at.y - before.y) / 2, size);
      if (apart > 0 && now > 0) store.zoom(apart / now);
    };
    const up = (event: PointerEvent) => {
      const at = place(event);
      pointers.delete(event.pointerId);
      if (pressed && !pressed.moved && event.button === 0 && event.type === 'pointerup') {
        handlers.current.onClick(at.x, at.y, event.shiftKey);
      }
      pressed = null;
    };
    const wheel = (event: WheelEvent) => {
      event.preventDefault();
      const at = place(event);
      const lines = event.deltaMode === WheelEvent.DOM_DELTA_LINE ? 16 : 1;
      store.zoom(Math.exp(event.deltaY * lines * WHEEL_RATE), {
        dx: at.x - size.width / 2,
        dy: at.y - size.height / 2,
        size,
      });
    };
    const leave = () => handlers.current.onLeave();
    const noMenu = (event: Event) => event.preventDefault();

    view.addEventListener('pointerdown', down);
    view.addEventListener('pointermove', move);
    view.addEventListener('pointerup', up);
    view.addEventListener('pointercancel', up);
    view.addEventListener('pointerleave', leave);
    view.addEventListener('wheel', wheel, { passive: false });
    view.addEventListener('contextmenu', noMenu);
    return () => {
      view.removeEventListener('pointerdown', down);
      view.removeEventListener('pointermove', move);
      view.removeEventListener('pointerup', up);
      view.removeEventListener('pointercancel', up);
      view.removeEventListener('pointerleave', leave);
      view.removeEventListener('wheel', wheel);
      view.removeEventListener('contextmenu', noMenu);
    };
  }, [element, store, size, handlers]);
}
