"use client";

import { useElementSize } from "@mantine/hooks";
import { type Boundary, boundariesOf } from "@/lib/deals/classEdits";
import type { ClassText } from "@/lib/deals/form";
import type { PricingReport } from "@/lib/pricing/report";
import { Grip } from "./Grip";
import { axisTicks, heightOf, type View } from "./geometry";
import styles from "./hull.module.css";
import { LawPanel } from "./LawPanel";
import { type LawView, waterLine } from "./law";
import { Planks } from "./Planks";

const HEIGHT = 420;
const AXIS = 44;
const RIGHT = 108;

/**
 * The capital structure as a hull to scale, the loss law beside it on the same height, and water lines at probability
 * levels across both. Boundaries are dragged by pointer, or moved by the arrow keys.
 */
export function Hull({
  classes,
  law,
  levels,
  reach,
  lawView,
  onMove,
}: {
  classes: readonly ClassText[];
  law: PricingReport["lossLaw"] | undefined;
  /** Probability levels of the water lines, decimals. */
  levels: readonly number[];
  /** The loss at the top of the drawing, a fraction of the pool. */
  reach: number;
  lawView: LawView;
  /** Moves a boundary, strikes in percent; absent where the reader may not edit. `gesture` names the drag. */
  onMove?: ((from: number, to: number, gesture: string) => void) | undefined;
}) {
  const { ref, width: measured } = useElementSize();
  const width = Math.max(330, measured || 900);
  const view: View = { height: HEIGHT, reach };
  const boundaries = boundariesOf(classes);
  const inner = width - AXIS - RIGHT;
  const hullWidth = inner * 0.52;
  const lawLeft = AXIS + hullWidth + 14;
  const lawWidth = inner - hullWidth - 14;
  const lines = law ? levels.map((level) => ({ level, loss: waterLine(law, level) })) : [];
  return (
    <figure
      className={styles.figure}
      ref={ref}
      aria-label="Capital structure to scale, with the loss law beside it"
    >
      {/* biome-ignore lint/a11y/noSvgWithoutTitle: the figure around it has the name; a title would pop up everywhere */}
      <svg
        className={styles.drawing}
        viewBox={`-1 -14 ${width + 2} ${HEIGHT + 40}`}
        height={HEIGHT + 40}
        aria-hidden={onMove ? undefined : true}
      >
        {axisTicks(reach).map((tick) => (
          <g key={tick}>
            <line
              className={styles.axis}
              x1={AXIS - 4}
              x2={width - RIGHT}
              y1={heightOf(tick, view)}
              y2={heightOf(tick, view)}
            />
            <text className={styles.quiet} x={AXIS - 8} y={heightOf(tick, view) + 4} textAnchor="end">
              {Number((tick * 100).toPrecision(6))} %
            </text>
          </g>
        ))}
        <Planks classes={classes} view={view} left={AXIS} width={hullWidth} />
        {law && <LawPanel law={law} view={view} left={lawLeft} width={lawWidth} lawView={lawView} />}
        <WaterLines lines={lines} view={view} left={AXIS} right={width - RIGHT} />
        {onMove &&
          boundaries
            .filter(({ at }) => at > 0 && at < 100 && at / 100 <= reach)
            .map((boundary, i) => (
              <Grip
                key={`${boundary.below} ${boundary.above}`}
                boundary={boundary}
                words={boundaryWords(boundary, classes)}
                side={i % 2 === 0 ? "left" : "right"}
                view={view}
                left={AXIS}
                width={hullWidth}
                onMove={onMove}
              />
            ))}
        <text className={styles.quiet} x={AXIS + hullWidth / 2} y={HEIGHT + 20} textAnchor="middle">
          Classes, loss as % of the pool
        </text>
        {law && (
          <text className={styles.quiet} x={lawLeft + lawWidth / 2} y={HEIGHT + 20} textAnchor="middle">
            {lawView === "mass" ? "Probability of the loss" : "Probability of losing more, powers of ten"}
          </text>
        )}
      </svg>
    </figure>
  );
}

function WaterLines({
  lines,
  view,
  left,
  right,
}: {
  lines: readonly { level: number; loss: number }[];
  view: View;
  left: number;
  right: number;
}) {
  return (
    <g>
      {lines
        .filter(({ loss }) => loss <= view.reach)
        .map(({ level, loss }) => {
          const y = heightOf(loss, view);
          return (
            <g key={level}>
              <line className={styles.water} x1={left} x2={right + 4} y1={y} y2={y} />
              <text className={styles.waterLabel} x={right + 8} y={y + 4}>
                {Number((level * 100).toPrecision(8))} %: {Number((loss * 100).toPrecision(4))} %
              </text>
            </g>
          );
        })}
    </g>
  );
}

function boundaryWords({ below, above }: Boundary, classes: readonly ClassText[]): string {
  const nameOf = (key: string | null) => classes.find((row) => row.key === key)?.name || "an unnamed class";
  if (below && above) return `Boundary between ${nameOf(below)} and ${nameOf(above)}`;
  return below ? `Detachment of ${nameOf(below)}` : `Attachment of ${nameOf(above)}`;
}
