import type { AmountGrid } from "../portfolio/amountGrid";

/** Conditional mass below this is dropped at both ends: far below any figure, far above the subnormal numbers. */
const NEGLIGIBLE = 1e-30;

/**
 * The conditional law of a sum of independent defaults on a grid, built by adding names one at a time (Andersen,
 * Sidenius & Basu 2003). One instance holds its working memory; `add` and `reset` never allocate.
 */
export class ConditionalLaw {
  /** Mass at 0..top steps; zero outside [low, high]. */
  readonly mass: Float64Array;
  /** Mass above `top` steps. */
  overflow = 0;
  low = 0;
  high = 0;

  constructor(readonly top: number) {
    this.mass = new Float64Array(top + 1);
    this.mass[0] = 1;
  }

  /** Back to no loss for certain. */
  reset(): void {
    this.mass.fill(0, this.low, this.high + 1);
    this.mass[0] = 1;
    this.overflow = 0;
    this.low = 0;
    this.high = 0;
  }

  /** Adds every name of the grid with its conditional default probability. */
  addAll(grid: AmountGrid, probabilities: Float64Array): void {
    const { shares } = grid;
    for (let i = 0; i < shares.length; i++) {
      const share = shares[i]!;
      const weights = share.weights;
      const probability = probabilities[i]!;
      if (probability === 0) continue;
      if (weights.length === 1) this.addOne(probability, share.steps);
      else if (weights.length === 2) this.addShared(probability, share.steps, weights[0]!, weights[1]!, 0);
      else this.addShared(probability, share.steps, weights[0]!, weights[1]!, weights[2]!);
    }
  }

  /** Adds a name that loses `steps` whole steps with the given probability. */
  addOne(probability: number, steps: number): void {
    if (steps === 0) return;
    const { mass, top } = this;
    const stay = 1 - probability;
    if (this.high + steps > top) {
      let lost = 0;
      for (let u = Math.max(this.low, top - steps + 1); u <= this.high; u++) lost += mass[u]!;
      this.overflow += probability * lost;
    }
    const high = Math.min(this.high + steps, top);
    for (let u = high; u >= this.low + steps; u--) mass[u] = stay * mass[u]! + probability * mass[u - steps]!;
    const below = Math.min(this.low + steps - 1, this.high);
    for (let u = below; u >= this.low; u--) mass[u] = stay * mass[u]!;
    this.high = high;
    this.trim();
  }

  /** Adds a name whose loss is laid on two or three neighbouring grid points with weights that keep its mean. */
  addShared(probability: number, steps: number, first: number, second: number, third: number): void {
    const { mass, top } = this;
    const stay = 1 - probability;
    const one = probability * first;
    const two = probability * second;
    const three = probability * third;
    const reach = steps + (third === 0 ? 1 : 2);
    if (this.high + reach > top) this.overflow += this.spilled(steps, one, two, three);
    const high = Math.min(this.high + reach, top);
    const { low } = this;
    for (let u = high; u >= low; u--) {
      const from = u - steps;
      let value = stay * mass[u]!;
      if (from >= low) value += one * mass[from]!;
      if (from - 1 >= low) value += two * mass[from - 1]!;
      if (from - 2 >= low) value += three * mass[from - 2]!;
      mass[u] = value;
    }
    this.high = high;
    this.trim();
  }

  /** Mass that a shared name takes above the top. */
  private spilled(steps: number, one: number, two: number, three: number): number {
    const { mass, top } = this;
    let lost = 0;
    for (let u = Math.max(this.low, top - steps - 1); u <= this.high; u++) {
      const weight =
        (u + steps > top ? one : 0) + (u + steps + 1 > top ? two : 0) + (u + steps + 2 > top ? three : 0);
      lost += weight * mass[u]!;
    }
    return lost;
  }

  private trim(): void {
    const { mass } = this;
    while (this.high > this.low && Math.abs(mass[this.high]!) < NEGLIGIBLE) mass[this.high--] = 0;
    while (this.low < this.high && Math.abs(mass[this.low]!) < NEGLIGIBLE) mass[this.low++] = 0;
  }
}
