import type { ClassText } from "@/lib/deals/form";
import { axisTicks, heightOf, type View } from "../_structure/hull/geometry";
import styles from "../_structure/hull/hull.module.css";
import { Planks } from "../_structure/hull/Planks";

const HEIGHT = 260;
const WIDTH = 290;
const AXIS = 40;

/** A structure to scale, small: to be laid beside others of the same height. */
export function MiniHull({
  classes,
  reach,
  name,
}: {
  classes: readonly ClassText[];
  reach: number;
  name: string;
}) {
  const view: View = { height: HEIGHT, reach };
  return (
    <svg
      viewBox={`0 -10 ${WIDTH} ${HEIGHT + 20}`}
      width="100%"
      className={styles.drawing}
      role="img"
      aria-label={`Classes of ${name} to scale; the table below has their figures`}
    >
      {axisTicks(reach).map((tick) => (
        <g key={tick}>
          <line
            className={styles.axis}
            x1={AXIS - 4}
            x2={WIDTH}
            y1={heightOf(tick, view)}
            y2={heightOf(tick, view)}
          />
          <text className={styles.quiet} x={AXIS - 7} y={heightOf(tick, view) + 4} textAnchor="end">
            {Number((tick * 100).toPrecision(6))} %
          </text>
        </g>
      ))}
      <Planks classes={classes} view={view} left={AXIS} width={WIDTH - AXIS - 2} />
    </svg>
  );
}
