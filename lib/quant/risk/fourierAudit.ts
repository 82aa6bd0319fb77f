import { cosinePi } from "../maths/chebyshev";
import { normalCdf, normalDensity } from "../maths/normal";
import type { AmountGrid } from "../portfolio/amountGrid";

/**
 * A second opinion on a loss law: the characteristic function of the conditional law on the same lattice, mixed over the
 * factor by the trapezoidal rule on the whole line and inverted by a discrete Fourier sum. Nothing of the recursion or
 * the adaptive quadrature is used. Loadings in (−1, 1); exact lattices only.
 */
export function fourierMasses(
  grid: AmountGrid,
  thresholds: Float64Array,
  loadings: Float64Array,
  steps: number,
): Float64Array {
  const size = grid.top + 1;
  const half = Math.floor(size / 2);
  const real = new Float64Array(half + 1);
  const imaginary = new Float64Array(half + 1);
  const probabilities = new Float64Array(thresholds.length);
  const cosines = Float64Array.from({ length: size }, (_, turn) => cosineTurn(turn, size));
  const sines = Float64Array.from({ length: size }, (_, turn) => sineTurn(turn, size));
  const width = 24 / steps;
  for (let k = 0; k <= steps; k++) {
    const factor = -12 + k * width;
    const weight = width * normalDensity(factor);
    if (weight < 1e-30) continue;
    for (let i = 0; i < probabilities.length; i++) {
      const loading = loadings[i]!;
      probabilities[i] = normalCdf(
        (thresholds[i]! - loading * factor) / Math.sqrt((1 - loading) * (1 + loading)),
      );
    }
    for (let w = 0; w <= half; w++) {
      let re = 1;
      let im = 0;
      for (let i = 0; i < probabilities.length; i++) {
        const turn = (w * grid.shares[i]!.steps) % size;
        const p = probabilities[i]!;
        const x = 1 - p + p * cosines[turn]!;
        const y = p * sines[turn]!;
        const next = re * x - im * y;
        im = re * y + im * x;
        re = next;
      }
      real[w]! += weight * re;
      imaginary[w]! += weight * im;
    }
  }
  return inverse(real, imaginary, cosines, sines);
}

function inverse(
  real: Float64Array,
  imaginary: Float64Array,
  cosines: Float64Array,
  sines: Float64Array,
): Float64Array {
  const size = cosines.length;
  const masses = new Float64Array(size);
  for (let u = 0; u < size; u++) {
    let sum = real[0]!;
    for (let w = 1; w < real.length; w++) {
      const turn = (w * u) % size;
      const twice = 2 * w === size ? 1 : 2;
      sum += twice * (real[w]! * cosines[turn]! + imaginary[w]! * sines[turn]!);
    }
    masses[u] = sum / size;
  }
  return masses;
}

/** cos and sin of 2π turn/size. */
function cosineTurn(turn: number, size: number): number {
  const u = (2 * turn) / size;
  return u <= 1 ? cosinePi(u) : cosinePi(2 - u);
}

function sineTurn(turn: number, size: number): number {
  const u = (2 * turn) / size - 0.5;
  const folded = u < 0 ? -u : u > 1 ? 2 - u : u;
  return cosinePi(folded);
}
