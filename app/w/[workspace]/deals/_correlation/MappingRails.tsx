import { Text } from "@mantine/core";
import { fourDigits } from "@/app/_ui/figures";
import type { MappedLine } from "./mappedLines";
import styles from "./mapping.module.css";

const WIDTH = 520;
const HEIGHT = 132;
const SIDE = 14;
const RAILS = { deal: 34, quoted: 98 };

/** Two rails to one scale, the deal's strikes above and the quoted pool's below, a line from each strike to where it is read. */
export function MappingRails({ lines }: { lines: readonly MappedLine[] }) {
  const reach = Math.min(1, 1.1 * Math.max(...lines.flatMap(({ strike, quoted }) => [strike, quoted ?? 0])));
  const x = (strike: number) => SIDE + ((WIDTH - 2 * SIDE) * strike) / reach;
  const shown = lines.filter(({ quoted }) => quoted !== null);
  return (
    <figure style={{ margin: 0 }}>
      <Text component="figcaption" size="sm">
        The deal's strikes (above) and where the quoted pool's curve is read for them (below), % of each pool
      </Text>
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        className={styles.rails}
        role="img"
        aria-label="Each strike of the deal joined to its strike of the quoted pool; the figures are in the table beside it"
      >
        {Object.values(RAILS).map((y) => (
          <line key={y} x1={x(0)} x2={x(reach)} y1={y} y2={y} className={styles.rail} />
        ))}
        {lines.map(({ strike }, i) => (
          <g key={strike}>
            <line
              x1={x(strike)}
              x2={x(strike)}
              y1={RAILS.deal - 5}
              y2={RAILS.deal + 5}
              className={styles.tick}
            />
            <text
              x={x(strike)}
              y={RAILS.deal - (i % 2 ? 22 : 10)}
              textAnchor="middle"
              className={styles.label}
            >
              {fourDigits(strike, "percent")}
            </text>
          </g>
        ))}
        {shown.map(({ strike, quoted }, i) => (
          <g key={strike}>
            <line x1={x(strike)} x2={x(quoted!)} y1={RAILS.deal} y2={RAILS.quoted} className={styles.join} />
            <circle cx={x(quoted!)} cy={RAILS.quoted} r={3} className={styles.end} />
            <text
              x={x(quoted!)}
              y={RAILS.quoted + (i % 2 ? 30 : 18)}
              textAnchor="middle"
              className={styles.label}
            >
              {fourDigits(quoted!, "percent")}
            </text>
          </g>
        ))}
      </svg>
    </figure>
  );
}
