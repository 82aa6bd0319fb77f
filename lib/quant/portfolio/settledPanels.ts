import { PANEL_POINTS } from "../kernel/recursion";
import { normalDensity } from "../maths/normal";
import { gaussLegendre } from "../maths/quadrature";

/** How far a mixture is taken: errors allowed in each probe, absolute and relative to its size (the smaller counts). */
export interface PanelAccuracy {
  readonly absolute: number;
  readonly relative: number;
}

/** What a mixture is held to. */
export interface PanelStandard {
  readonly accuracy: PanelAccuracy;
  /** Sizes below which probes are not held to the relative standard. */
  readonly floor: number;
  /** The last probe's value where it is known: it must come out of the mixture. */
  readonly known: number | null;
}

/** A panel worked out: each probe's integral over it and the estimated error of that. */
export interface JudgedPanel {
  readonly values: Float64Array;
  readonly errors: Float64Array;
}

interface Placed<Panel> {
  readonly from: number;
  readonly to: number;
  readonly depth: number;
  readonly panel: Panel;
}

const RULE = gaussLegendre(PANEL_POINTS);
const DEEPEST = 14;
const MOST_PANELS = 2_000;
/** Share of the allowed error that one panel may take at first; where the known value is missed, down to the strictest. */
const FIRST_STANDARD = 0.1;
const STRICTEST = 1e-6;
const KNOWN_ERROR = 5e-13;
/** Errors below this are noise of what the recursion drops. */
const BELOW_NOTICE = 1e-22;

/**
 * Panels between `boundaries`, each worked out at sixteen Gauss–Legendre points with the factor's density in the weights, and
 * halved where its probes are not settled.
 */
export function settledPanels<Panel extends JudgedPanel>(
  boundaries: readonly number[],
  standard: PanelStandard,
  workOut: (factors: Float64Array, weights: Float64Array) => Panel,
): Panel[] {
  const place = (from: number, to: number, depth: number): Placed<Panel> => {
    const half = 0.5 * (to - from);
    const centre = 0.5 * (to + from);
    const factors = RULE.nodes.map((node) => centre + half * node);
    const weights = RULE.weights.map((weight, k) => weight * half * normalDensity(factors[k]!));
    return { from, to, depth, panel: workOut(factors, weights) };
  };
  let placed = boundaries.slice(1).map((to, i) => place(boundaries[i]!, to, 0));
  let share = FIRST_STANDARD;
  for (;;) {
    const allowed = allowedErrors(placed, standard, share);
    const isRough = ({ depth, panel }: Placed<Panel>) =>
      depth < DEEPEST && panel.errors.some((error, i) => error > allowed[i]! && error > BELOW_NOTICE);
    const rough = new Set(placed.filter(isRough));
    if (placed.length + rough.size > MOST_PANELS) break;
    if (rough.size === 0) {
      if (share < STRICTEST || missesKnown(placed, standard) <= KNOWN_ERROR) break;
      share *= 0.1;
      continue;
    }
    placed = placed.flatMap((old) => {
      if (!rough.has(old)) return [old];
      const centre = 0.5 * (old.from + old.to);
      return [place(old.from, centre, old.depth + 1), place(centre, old.to, old.depth + 1)];
    });
  }
  return placed.map(({ panel }) => panel);
}

function missesKnown(placed: readonly Placed<JudgedPanel>[], { known }: PanelStandard): number {
  if (known === null) return 0;
  const found = placed.reduce((sum, { panel }) => sum + panel.values[panel.values.length - 1]!, 0);
  return Math.abs(found - known);
}

function allowedErrors(
  placed: readonly Placed<JudgedPanel>[],
  { accuracy, floor }: PanelStandard,
  share: number,
): Float64Array {
  const totals = new Float64Array(placed[0]?.panel.values.length ?? 0);
  for (const { panel } of placed)
    for (let i = 0; i < totals.length; i++) totals[i]! += Math.abs(panel.values[i]!);
  return totals.map((total) => {
    const size = Math.max(total, floor);
    return share * Math.max(Math.min(accuracy.absolute, accuracy.relative * size), 1e-15 * size);
  });
}
