import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';
import { BAR_WORD } from './barWord.ts';
import { ZOOM_STEP } from './camera/cameraKeys.ts';
import type { CameraStore, ViewSize } from './camera/cameraStore.ts';
import { CORNER_VIEWS, STRAIGHT_VIEWS, type NamedView } from './camera/namedViews.ts';
import type { Bounds } from './model/bounds.ts';

interface ViewBarProps {
  readonly camera: CameraStore;
  readonly bounds: Bounds;
  readonly size: ViewSize;
  readonly tools?: ReactNode;
}

const STEP_PX = 60;
const STEP_TURN = Math.PI / 12;

/** The quiet strip above the view: tools handed in, and the view's own words. Every drag has a word here. */
export function ViewBar({ camera, bounds, size, tools }: ViewBarProps) {
  const turn = (azimuth: number, elevation: number) => () => camera.orbit(azimuth, elevation);
  const move = (dx: number, dy: number) => () => camera.pan(dx * STEP_PX, dy * STEP_PX, size);
  return (
    <div
      role="toolbar"
      aria-label="View"
      className="flex min-h-10 shrink-0 items-center gap-x-1 overflow-x-auto border-b border-rule bg-ground px-2 py-1"
    >
      {tools}
      <span className="mx-1 grow" />
      <WordMenu word="Views">
        <Views views={STRAIGHT_VIEWS} camera={camera} />
        <DropdownMenu.Separator className="my-1 border-t border-rule" />
        <Views views={CORNER_VIEWS} camera={camera} />
      </WordMenu>
      <WordMenu word="Turn and move">
        <Item onSelect={turn(STEP_TURN, 0)}>Turn left</Item>
        <Item onSelect={turn(-STEP_TURN, 0)}>Turn right</Item>
        <Item onSelect={turn(0, STEP_TURN)}>Turn up</Item>
        <Item onSelect={turn(0, -STEP_TURN)}>Turn down</Item>
        <DropdownMenu.Separator className="my-1 border-t border-rule" />
        <Item onSelect={move(-1, 0)}>Move left</Item>
        <Item onSelect={move(1, 0)}>Move right</Item>
        <Item onSelect={move(0, -1)}>Move up</Item>
        <Item onSelect={move(0, 1)}>Move down</Item>
      </WordMenu>
      <button
        type="button"
        className={BAR_WORD}
        aria-label="Zoom in"
        onClick={() => camera.zoom(1 / ZOOM_STEP)}
      >
        +
      </button>
      <button
        type="button"
        className={BAR_WORD}
        aria-label="Zoom out"
        onClick={() => camera.zoom(ZOOM_STEP)}
      >
        −
      </button>
      <button type="button" className={BAR_WORD} onClick={() => camera.fit(bounds, size)}>
        Fit
      </button>
    </div>
  );
}

function Views({ views, camera }: { views: readonly NamedView[]; camera: CameraStore }) {
  return views.map((view) => (
    <Item key={view.name} onSelect={() => camera.look(view)}>
      {view.name}
    </Item>
  ));
}

function WordMenu({ word, children }: { word: string; children: ReactNode }) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger className={BAR_WORD}>{word}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="start"
          sideOffset={4}
          className="z-50 min-w-40 rounded border border-ink bg-sheet py-1"
        >
          {children}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}

function Item({ onSelect, children }: { onSelect: () => void; children: ReactNode }) {
  return (
    <DropdownMenu.Item
      onSelect={(event) => {
        // The menu stays open, so that several steps take one opening.
        event.preventDefault();
        onSelect();
      }}
      className="flex min-h-8 cursor-pointer items-center px-3 outline-none data-[highlighted]:bg-ink data-[highlighted]:text-sheet"
    >
      {children}
    </DropdownMenu.Item>
  );
}
