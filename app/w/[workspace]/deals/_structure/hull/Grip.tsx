"use client";

import { type KeyboardEvent, type PointerEvent, useRef } from "react";
import type { Boundary } from "@/lib/deals/classEdits";
import { beam, heightOf, lossAt, type View } from "./geometry";
import styles from "./hull.module.css";

/** Steps of the arrow keys in percent of the pool: plain, with Shift, with Alt. */
const STEP = { plain: 0.1, shift: 1, alt: 0.01 };

/** A boundary that can be moved: by pointer in steps of a tenth of a percent, by arrow keys, finer with Alt. */
export function Grip({
  boundary,
  words,
  side,
  view,
  left,
  width,
  onMove,
}: {
  boundary: Boundary;
  words: string;
  side: "left" | "right";
  view: View;
  left: number;
  width: number;
  onMove(from: number, to: number, gesture: string): void;
}) {
  const drag = useRef<{ gesture: string; at: number } | null>(null);
  const y = heightOf(boundary.at / 100, view);
  const half = (width / 2) * beam(1 - y / view.height);
  const x = left + width / 2 + (side === "left" ? -half : half);

  const down = (event: PointerEvent<SVGGElement>) => {
    event.currentTarget.setPointerCapture(event.pointerId);
    drag.current = { gesture: `drag ${event.timeStamp}`, at: boundary.at };
  };
  const move = (event: PointerEvent<SVGGElement>) => {
    const dragged = drag.current;
    const drawing = event.currentTarget.ownerSVGElement;
    if (!dragged || !drawing) return;
    const matrix = drawing.getScreenCTM();
    if (!matrix) return;
    const at = lossAt(new DOMPoint(event.clientX, event.clientY).matrixTransform(matrix.inverse()).y, view);
    const step = event.altKey ? STEP.alt : STEP.plain;
    const to = Number((Math.round((at * 100) / step) * step).toPrecision(8));
    if (to !== boundary.at) onMove(boundary.at, to, dragged.gesture);
  };
  const key = (event: KeyboardEvent<SVGGElement>) => {
    const sign = { ArrowUp: 1, ArrowDown: -1 }[event.key];
    if (!sign) return;
    event.preventDefault();
    const step = event.shiftKey ? STEP.shift : event.altKey ? STEP.alt : STEP.plain;
    onMove(
      boundary.at,
      Number((boundary.at + sign * step).toPrecision(10)),
      `keys ${boundary.below} ${boundary.above}`,
    );
  };
  return (
    <g
      role="slider"
      tabIndex={0}
      aria-label={words}
      aria-orientation="vertical"
      aria-valuenow={boundary.at}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuetext={`${boundary.at} % of the pool`}
      className={styles.grip}
      onPointerDown={down}
      onPointerMove={move}
      onPointerUp={() => {
        drag.current = null;
      }}
      onKeyDown={key}
    >
      <title>{`${words}: ${boundary.at} %. Drag, or use the arrow keys (Shift coarser, Alt finer).`}</title>
      <line x1={left} x2={left + width} y1={y} y2={y} />
      <rect x={x - 8} y={y - 4} width={16} height={8} rx={2} />
    </g>
  );
}
