import type { DealClass } from "@/lib/deals/schema";
import classes from "./hull.module.css";

const HEIGHT = 260;
const THINNEST = 18;

/** The capital structure as a hull: the keel (first loss) at the bottom, heights to scale, thin classes kept legible. */
export function Hull({
  classes: tranches,
}: {
  classes: readonly Pick<DealClass, "id" | "name" | "attachment" | "detachment">[];
}) {
  const sorted = [...tranches].sort((one, other) => other.attachment - one.attachment);
  const scale = HEIGHT / Math.max(0.01, ...tranches.map((tranche) => tranche.detachment));
  return (
    <figure className={classes.hull} aria-label="Capital structure to scale">
      {sorted.map((tranche, i) => {
        const height = Math.max(THINNEST, (tranche.detachment - tranche.attachment) * scale);
        return (
          <div
            key={tranche.id}
            className={classes.plank}
            style={{ height, width: `${100 - 7 * Math.min(i, 8)}%` }}
          >
            <span>{tranche.name}</span>
            <span className="figure">
              {percent(tranche.attachment)} to {percent(tranche.detachment)}
            </span>
          </div>
        );
      })}
    </figure>
  );
}

function percent(value: number): string {
  return `${Number((value * 100).toPrecision(6))} %`;
}
