/** A class as it is drawn: strikes in fractions of the pool. */
export interface Plank {
  readonly key: string;
  readonly name: string;
  readonly attachment: number;
  readonly detachment: number;
}

/** How much of the pool is in view, and how many pixels it has. */
export interface View {
  readonly height: number;
  /** The loss at the top of the view, a fraction of the pool. */
  readonly reach: number;
}

/** The height of a loss in the view, in pixels from its top; losses beyond the reach lie at the top. */
export function heightOf(loss: number, { height, reach }: View): number {
  return height * (1 - Math.min(loss, reach) / reach);
}

/** The loss at a height in the view. */
export function lossAt(y: number, { height, reach }: View): number {
  return reach * (1 - Math.min(Math.max(y, 0), height) / height);
}

/** The half width of the hull at a share of its height, 0 at the keel and 1 at the deck. */
export function beam(share: number): number {
  return 0.62 + 0.38 * Math.sqrt(share);
}

/** The outline of a plank between two heights, its sides following the hull, as an SVG path. */
export function plankPath(
  top: number,
  bottom: number,
  left: number,
  width: number,
  { height }: View,
): string {
  const steps = 6;
  const middle = left + width / 2;
  const at = (i: number) => top + ((bottom - top) * i) / steps;
  const half = (y: number) => (width / 2) * beam(1 - y / height);
  const points = Array.from({ length: steps + 1 }, (_, i) => at(i));
  const right = points.map((y) => `${(middle + half(y)).toFixed(1)} ${y.toFixed(1)}`);
  const back = points.reverse().map((y) => `${(middle - half(y)).toFixed(1)} ${y.toFixed(1)}`);
  return `M${right.join("L")}L${back.join("L")}Z`;
}

/** Places labels of a height each at their wished places, moved apart just enough and kept inside the view. */
export function placeLabels(wished: readonly number[], labelHeight: number, height: number): number[] {
  const order = wished.map((y, i) => ({ y, i })).sort((one, other) => one.y - other.y);
  const placed = new Array<number>(wished.length);
  let free = labelHeight / 2;
  for (const { y, i } of order) {
    placed[i] = Math.max(y, free);
    free = placed[i] + labelHeight;
  }
  let limit = height - labelHeight / 2;
  for (const { i } of order.reverse()) {
    placed[i] = Math.min(placed[i]!, limit);
    limit = placed[i]! - labelHeight;
  }
  return placed;
}

/** Round steps for an axis from 0 to the reach: at most `most` of them. */
export function axisTicks(reach: number, most = 7): number[] {
  const rough = reach / most;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((by) => by * power).find((size) => size >= rough) ?? 10 * power;
  return Array.from({ length: Math.floor(reach / step + 1e-9) + 1 }, (_, i) =>
    Number((i * step).toPrecision(12)),
  );
}
