import type { ConditionalFamily } from "../maths/adaptiveMixture";

/** A family of conditional figures that are all mixed as they are: every figure is a probe. */
export abstract class MixedProbes implements ConditionalFamily {
  readonly total: Float64Array;
  protected readonly values: Float64Array;
  private readonly panel: Float64Array;

  constructor(readonly probes: number) {
    this.total = new Float64Array(probes);
    this.panel = new Float64Array(probes);
    this.values = new Float64Array(probes);
  }

  /** Fills `values` given the factor. */
  protected abstract fill(factor: number): void;

  evaluate(factor: number, probes: Float64Array): void {
    this.fill(factor);
    probes.set(this.values);
  }

  accumulate(weight: number): void {
    for (let i = 0; i < this.probes; i++) this.panel[i]! += weight * this.values[i]!;
  }

  clearPanel(): void {
    this.panel.fill(0);
  }

  acceptPanel(): void {
    for (let i = 0; i < this.probes; i++) this.total[i]! += this.panel[i]!;
  }
}
