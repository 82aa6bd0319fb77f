import type { ClassText } from "@/lib/deals/form";
import { typedNumber } from "@/lib/platform/typed";
import { heightOf, type Plank, placeLabels, plankPath, type View } from "./geometry";
import styles from "./hull.module.css";

const LABEL = 14;

/** The classes as planks of the hull; a plank too thin for its name has it beside, on a line of its own. */
export function Planks({
  classes,
  view,
  left,
  width,
}: {
  classes: readonly ClassText[];
  view: View;
  left: number;
  width: number;
}) {
  const planks = planksOf(classes);
  const drawn = planks
    .filter(({ attachment }) => attachment < view.reach)
    .sort((one, other) => one.attachment - other.attachment)
    .map((plank) => ({
      ...plank,
      top: heightOf(plank.detachment, view),
      bottom: heightOf(plank.attachment, view),
      isCut: plank.detachment > view.reach * (1 + 1e-9),
    }));
  const places = placeLabels(
    drawn.map(({ top, bottom }) => (top + bottom) / 2),
    LABEL,
    view.height,
  );
  return (
    <g>
      {drawn.map(({ key, name, attachment, detachment, top, bottom, isCut }, i) => {
        const shade = drawn.length > 1 ? i / (drawn.length - 1) : 0;
        const y = places[i]!;
        const isThin = bottom - top < LABEL;
        const fill = `color-mix(in srgb, light-dark(#8cc4bd, #2c6a64) ${Math.round(100 - shade * 80)}%, light-dark(#f3f9f8, #142625))`;
        return (
          <g key={key}>
            <path className={styles.plank} d={plankPath(top, bottom, left, width, view)} style={{ fill }}>
              <title>{`${name}: ${percent(attachment)} to ${percent(detachment)}`}</title>
            </path>
            {isThin && (
              <path
                className={styles.leader}
                d={`M${left + width * 0.32} ${(top + bottom) / 2}L${left + width * 0.28} ${y}`}
              />
            )}
            <text className={styles.label} x={left + width / 2} y={y + 4} textAnchor="middle">
              {name} · {percent(attachment)} to {percent(detachment)}
              {isCut ? ", cut at the top" : ""}
            </text>
          </g>
        );
      })}
    </g>
  );
}

/** The classes whose strikes can be read. */
export function planksOf(classes: readonly ClassText[]): Plank[] {
  return classes.flatMap((row) => {
    const low = typedNumber(row.attachment);
    const high = typedNumber(row.detachment);
    if (typeof low !== "number" || typeof high !== "number" || low >= high) return [];
    return [{ key: row.key, name: row.name || "Unnamed", attachment: low / 100, detachment: high / 100 }];
  });
}

function percent(value: number): string {
  return `${Number((value * 100).toPrecision(6))} %`;
}
