"use client";

import { useComputedColorScheme } from "@mantine/core";
import { type KeyboardEvent, type PointerEvent, useEffect, useRef, useState } from "react";
import { Figure } from "@/app/_ui/Figure";
import { fourDigits } from "@/app/_ui/figures";
import type { NameInput } from "@/lib/pricing/request";
import styles from "./pairMatrix.module.css";

const SIDE = 620;
/** Shares of the highest value that the legend shows. */
const STEPS = [0.02, 0.1, 0.25, 0.5, 0.75, 1];

/** A matrix of pairs as a heat map sorted by sector: a pair is chosen by pointer or by arrow keys, its figures stand above. */
export function PairMatrix({
  names,
  order,
  values,
  chosen,
  label,
  measure,
  onChoose,
}: {
  names: readonly NameInput[];
  order: readonly number[];
  values: readonly (readonly (number | null)[])[];
  chosen: readonly [number, number];
  label(i: number): string;
  /** What the values are. */
  measure: string;
  onChoose(pair: readonly [number, number]): void;
}) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const [hovered, setHovered] = useState<readonly [number, number] | null>(null);
  const isDark = useComputedColorScheme("light") === "dark";
  const count = order.length;
  const cell = SIDE / count;
  const top = Math.max(
    1e-12,
    ...order.flatMap((i) => order.map((k) => (i === k ? 0 : Math.abs(values[i]?.[k] ?? 0)))),
  );
  const [row, column] = chosen;
  const at = [order.indexOf(row), order.indexOf(column)] as const;

  useEffect(() => {
    const context = canvas.current?.getContext("2d");
    if (!context) return;
    context.clearRect(0, 0, SIDE, SIDE);
    for (const [y, i] of order.entries())
      for (const [x, k] of order.entries()) {
        context.fillStyle =
          i === k ? (isDark ? "#33504d" : "#c4d4d2") : shade(values[i]?.[k] ?? 0, top, isDark);
        context.fillRect(x * cell, y * cell, Math.ceil(cell), Math.ceil(cell));
      }
    context.strokeStyle = isDark ? "#e3f2f0" : "#12302e";
    context.lineWidth = 1;
    for (const [y, i] of order.entries()) {
      const before = order[y - 1];
      if (before === undefined || names[before]?.sector === names[i]?.sector) continue;
      context.strokeRect(0, y * cell, SIDE, 0);
      context.strokeRect(y * cell, 0, 0, SIDE);
    }
    context.strokeStyle = isDark ? "#ffd27a" : "#b3261e";
    context.lineWidth = 2;
    context.strokeRect(at[1] * cell - 1, at[0] * cell - 1, cell + 2, cell + 2);
  }, [order, values, names, cell, top, at[0], at[1], isDark]);

  const move = (event: KeyboardEvent) => {
    const step = { ArrowUp: [-1, 0], ArrowDown: [1, 0], ArrowLeft: [0, -1], ArrowRight: [0, 1] }[event.key];
    if (!step) return;
    event.preventDefault();
    const inside = (value: number) => Math.min(Math.max(value, 0), count - 1);
    onChoose([order[inside(at[0] + step[0]!)]!, order[inside(at[1] + step[1]!)]!]);
  };
  const pairUnder = (event: PointerEvent<HTMLCanvasElement>): readonly [number, number] => {
    const box = event.currentTarget.getBoundingClientRect();
    const place = (offset: number, size: number) =>
      Math.min(count - 1, Math.max(0, Math.floor((offset / size) * count)));
    return [
      order[place(event.clientY - box.top, box.height)]!,
      order[place(event.clientX - box.left, box.width)]!,
    ];
  };
  return (
    <figure className={styles.figure}>
      <div
        role="application"
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the matrix is walked by arrow keys
        tabIndex={0}
        className={styles.walked}
        aria-label={`Matrix of pairs, sorted by sector; arrow keys move. Now ${label(row)} and ${label(column)}. The figures of the pair stand above.`}
        onKeyDown={move}
      >
        <canvas
          ref={canvas}
          width={SIDE}
          height={SIDE}
          className={styles.matrix}
          onPointerDown={(event) => onChoose(pairUnder(event))}
          onPointerMove={(event) => setHovered(pairUnder(event))}
          onPointerLeave={() => setHovered(null)}
        />
      </div>
      <div className={styles.under} aria-hidden>
        {hovered && (
          <>
            Under the pointer: {label(hovered[0])}
            {hovered[0] !== hovered[1] && <> and {label(hovered[1])}</>}, {measure}{" "}
            <Figure value={values[hovered[0]]?.[hovered[1]] ?? null} unit="percent" /> %
          </>
        )}
      </div>
      <figcaption className={styles.legend}>
        {STEPS.map((share) => (
          <span key={share} className={styles.stepped}>
            <span className={styles.step} style={{ opacity: Math.sqrt(share) }} />
            {fourDigits(top * share, "percent")} %
          </span>
        ))}
        <span>the darker, the more; lines part sectors: {sectorsOf(order, names).join(", ")}</span>
      </figcaption>
    </figure>
  );
}

function shade(value: number, top: number, isDark: boolean): string {
  const share = Math.sqrt(Math.min(1, Math.abs(value) / top));
  return isDark ? `rgb(111 185 178 / ${share})` : `rgb(23 84 79 / ${share})`;
}

function sectorsOf(order: readonly number[], names: readonly NameInput[]): string[] {
  return [...new Set(order.map((i) => names[i]?.sector || "without sector"))];
}
