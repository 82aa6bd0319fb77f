import type { PricingReport } from "@/lib/pricing/report";
import { heightOf, type View } from "./geometry";
import styles from "./hull.module.css";
import { type LawView, stripsOf, tailOf } from "./law";

const LEAST = 1e-9;

/** The loss law at maturity, drawn sideways on the hull's own height. */
export function LawPanel({
  law,
  view,
  left,
  width,
  lawView,
}: {
  law: NonNullable<PricingReport["lossLaw"]>;
  view: View;
  left: number;
  width: number;
  lawView: LawView;
}) {
  if (lawView === "tail") {
    const powers = -Math.log10(LEAST);
    const xOf = (probability: number) =>
      left + width * (1 + Math.log10(Math.max(probability, LEAST)) / powers);
    const points = tailOf(law, view, LEAST).map(
      ({ loss, probability }) => `${xOf(probability).toFixed(1)} ${heightOf(loss, view).toFixed(1)}`,
    );
    return (
      <g>
        {[0, 3, 6, 9].map((power) => (
          <text key={power} className={styles.quiet} x={xOf(10 ** -power)} y={-3} textAnchor="middle">
            {power === 0 ? "1" : `1e-${power}`}
          </text>
        ))}
        <path className={styles.tail} d={`M${points.join("L")}`} />
      </g>
    );
  }
  const strips = stripsOf(law, view);
  const above = strips.slice(1).map(({ mass }) => mass);
  // The strip of no loss at all would hide the rest: it is cut at twice the next highest.
  const top = Math.max(Math.min(strips[0]?.mass ?? 0, 2 * Math.max(0, ...above)), ...above, 1e-12);
  return (
    <g>
      {strips.map(({ y, height, mass }) => (
        <rect
          key={y}
          className={styles.mass}
          x={left}
          y={y}
          width={Math.min(1, mass / top) * width}
          height={Math.max(0.75, height - 0.5)}
        >
          <title>{`${Number((mass * 100).toPrecision(4))} %`}</title>
        </rect>
      ))}
      {(strips[0]?.mass ?? 0) > top && (
        <text className={styles.label} x={left + width - 4} y={strips[0]!.y + 4} textAnchor="end">
          cut: {Number((strips[0]!.mass * 100).toPrecision(4))} %
        </text>
      )}
    </g>
  );
}
