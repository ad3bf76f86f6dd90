'use client';

import { useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import { createPortal } from 'react-dom';
import type { SheetActions } from './cells';

interface GripProps {
  id: string;
  /** What is carried, as its neighbours call it. */
  name: string;
  /** Reached by Tab too: of the cell in hand. */
  reachable: boolean;
  actions: SheetActions;
}

/** Where a carried cell would go: its place among the cells, and where on the screen that is. */
interface Drop {
  at: number;
  left: number;
  width: number;
  top: number;
  pointer: { x: number; y: number };
}

/** Pixels that a press has to go before it carries; less is a press. */
const LIFT = 4;
/** Pixels from the edge of the screen within which the sheet scrolls by itself. */
const EDGE = 70;

/** The gap between two cells that is nearest to a height on the screen. */
function findDrop(pointer: { x: number; y: number }): Drop | null {
  const blocks = [...document.querySelectorAll<HTMLElement>('[data-block]')];
  const boxes = blocks.map((block) => ({ block, box: block.getBoundingClientRect() }));
  const below = boxes.find(({ box }) => box.top + box.height / 2 > pointer.y);
  const last = boxes.at(-1);
  if (!last) return null;
  const { box, block } = below ?? last;
  return {
    at: Number(below ? block.dataset.from : block.dataset.until),
    left: box.left,
    width: box.width,
    top: below ? box.top : box.bottom,
    pointer,
  };
}

/**
 * The sign in the margin by which a cell is carried to another place, by mouse, pen or finger. With
 * the focus on it, the arrow keys move the cell; so do Alt and an arrow anywhere in the cell.
 */
export function Grip({ id, name, reachable, actions }: GripProps) {
  const [drop, setDrop] = useState<Drop | null>(null);
  const pressed = useRef<{ x: number; y: number } | null>(null);
  const scrolling = useRef(0);

  const putDown = () => {
    pressed.current = null;
    cancelAnimationFrame(scrolling.current);
    setDrop(null);
  };

  const carry = (pointer: { x: number; y: number }) => {
    cancelAnimationFrame(scrolling.current);
    setDrop(findDrop(pointer));
    const over = pointer.y < EDGE ? pointer.y - EDGE : pointer.y - (window.innerHeight - EDGE);
    if (pointer.y >= EDGE && over <= 0) return;
    scrolling.current = requestAnimationFrame(() => {
      window.scrollBy({ top: over / 4, behavior: 'instant' });
      if (pressed.current) carry(pointer);
    });
  };

  const onMove = ({ clientX: x, clientY: y }: PointerEvent) => {
    const from = pressed.current;
    if (!from || (drop === null && Math.hypot(x - from.x, y - from.y) < LIFT)) return;
    carry({ x, y });
  };

  const onKey = (event: KeyboardEvent) => {
    const by = event.key === 'ArrowUp' ? -1 : event.key === 'ArrowDown' ? 1 : null;
    if (event.key === 'Escape' && drop) putDown();
    else if (by !== null) actions.move(id, by);
    else return;
    event.preventDefault();
    event.stopPropagation();
  };

  return (
    <>
      <button
        type="button"
        tabIndex={reachable ? 0 : -1}
        aria-label={`Move ${name}: drag it, or press the up and down arrows`}
        onKeyDown={onKey}
        onPointerDown={(event) => {
          if (event.button !== 0) return;
          event.currentTarget.setPointerCapture(event.pointerId);
          pressed.current = { x: event.clientX, y: event.clientY };
        }}
        onPointerMove={onMove}
        onPointerUp={() => {
          if (drop) actions.place(id, drop.at);
          putDown();
        }}
        onPointerCancel={putDown}
        className={`absolute -left-2 top-6 grid h-11 w-4 touch-none place-items-center sm:-left-4 ${drop ? 'cursor-grabbing text-ruddle' : 'cursor-grab text-hairline hover:text-ink focus-visible:text-ink group-hover/block:text-rule'} print:hidden`}
      >
        <GripSign />
      </button>
      {drop &&
        createPortal(
          <>
            <div
              aria-hidden="true"
              className="pointer-events-none fixed z-40 h-0 border-t-2 border-ruddle"
              style={{ left: drop.left, width: drop.width, top: drop.top }}
            />
            <div
              aria-hidden="true"
              className="pointer-events-none fixed z-40 border border-ink bg-sheet px-2 py-0.5 text-small shadow-[3px_3px_0_var(--hairline)]"
              style={{ left: drop.pointer.x + 14, top: drop.pointer.y - 12 }}
            >
              {name}
            </div>
          </>,
          document.body,
        )}
    </>
  );
}

/** A dimension line standing upright: the way that the cell goes. */
function GripSign() {
  return (
    <svg viewBox="0 0 10 36" className="h-9 w-2.5" aria-hidden="true">
      <path d="M5 2V34M1 6L9 2M1 34L9 30" fill="none" stroke="currentColor" strokeWidth="1.5" />
    </svg>
  );
}
