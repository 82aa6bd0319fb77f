import type { RecursionBackend } from "./instructions";
import { writeNormalTable } from "./normalTable";

const TABLE_LOW = -13;
const TABLE_HIGH = 9;
const PLAIN_BELOW = 0.015625;
const SMALLEST_SCALE = 1e-100;
const LANES = 4;

/**
 * The recursion of `assembly/recursion.ts` in plain TypeScript, lane by lane in the same order of operations: the same
 * bits, where WebAssembly SIMD is missing and as the yardstick it is tested against.
 */
export function twinBackend(): RecursionBackend {
  let reals = new Float64Array(131_072);
  let wholes = new Int32Array(reals.buffer);
  writeNormalTable(reals.buffer);
  let work = 0;
  const p = new Float64Array(LANES);
  const stay = new Float64Array(LANES);
  const scale = new Float64Array(LANES);
  const sums = new Float64Array(LANES);
  const firsts = new Float64Array(LANES);

  const normalCdf = (x: number, table: number): number => {
    const inside = Math.min(Math.max(x, TABLE_LOW), TABLE_HIGH);
    const index = (inside * 64 + 832.5) | 0;
    const near = index * 0.015625 - 13;
    const step = inside - near;
    const square = near * near;
    const entry = (table >> 3) + 2 * index;
    const fifth = ((square - 6) * square + 3) * (1 / 120);
    const cube = near * (3 - square) * (1 / 24);
    const fourth = cube + step * fifth;
    const third = (square - 1) * (1 / 6) + step * fourth;
    const second = -0.5 * near + step * third;
    const series = 1 + step * second;
    return reals[entry]! + reals[entry + 1]! * step * series;
  };

  const conditional: RecursionBackend["conditional"] = (count, scaled, slopes, factors, table, out) => {
    for (let i = 0; i < count; i++) {
      const threshold = reals[(scaled >> 3) + i]!;
      const slope = reals[(slopes >> 3) + i]!;
      for (let lane = 0; lane < LANES; lane++) {
        const factor = reals[(factors >> 3) + lane]!;
        reals[(out >> 3) + LANES * i + lane] = normalCdf(threshold - slope * factor, table);
      }
    }
  };

  const isNegligible = (row: number, least: number): boolean => {
    for (let lane = 0; lane < LANES; lane++)
      if (!(Math.abs(reals[row + lane]!) * scale[lane]! < least)) return false;
    return true;
  };

  const spill = (
    rows: number,
    low: number,
    high: number,
    top: number,
    step: number,
    reach: number,
    base: number,
    weight: number,
    overflow: number,
  ): void => {
    sums.fill(0);
    firsts.fill(0);
    let next = high;
    for (let landing = 0; landing <= reach; landing++) {
      for (const least = Math.max(low, top - step - landing + 1); next >= least; next--) {
        for (let lane = 0; lane < LANES; lane++) {
          const mass = reals[rows + LANES * next + lane]!;
          sums[lane]! += mass;
          firsts[lane]! += next * mass;
        }
      }
      for (let lane = 0; lane < LANES; lane++) {
        const share = scale[lane]! * p[lane]! * reals[weight + landing]!;
        reals[overflow + lane]! += share * sums[lane]!;
        reals[overflow + LANES + lane]! += share * (firsts[lane]! + (base + landing) * sums[lane]!);
      }
    }
  };

  const moveOverflow = (overflow: number, size: number): void => {
    for (let lane = 0; lane < LANES; lane++)
      reals[overflow + LANES + lane]! += p[lane]! * size * reals[overflow + lane]!;
  };

  /** rows[u] = keep · rows[u] + one · rows[u − shift] + two · rows[u − shift − 1] + three · rows[u − shift − 2]. */
  const sweep = (
    from: number,
    to: number,
    shift: number,
    keep: number,
    one: number,
    two: number,
    three: number,
  ) => {
    let source = from - shift - LANES;
    let high = reals[from - shift]!;
    let middle = reals[source]!;
    for (let row = from; row >= to; row -= LANES) {
      source -= LANES;
      const low = reals[source]!;
      reals[row] = keep * reals[row]! + one * high + two * middle + three * low;
      high = middle;
      middle = low;
    }
  };

  const multiply = (from: number, to: number): void => {
    for (let row = from; row >= to; row -= LANES)
      for (let lane = 0; lane < LANES; lane++) reals[row + lane]! *= scale[lane]!;
  };

  const addNames: RecursionBackend["addNames"] = (
    count,
    top,
    negligible,
    rowsAt,
    steps,
    weights,
    sizes,
    probabilities,
    overflowAt,
    bounds,
  ) => {
    const rows = rowsAt >> 3;
    const overflow = overflowAt >> 3;
    let hasSpilled = false;
    let low = 0;
    let high = 0;
    scale.fill(1);
    reals.fill(0, overflow, overflow + 2 * LANES);
    for (let i = 0; i < count; i++) {
      const step = wholes[(steps >> 2) + i]!;
      const weight = (weights >> 3) + 3 * i;
      const second = reals[weight + 1]!;
      const third = reals[weight + 2]!;
      const reach = third !== 0 ? 2 : second !== 0 ? 1 : 0;
      for (let lane = 0; lane < LANES; lane++) {
        p[lane] = reals[(probabilities >> 3) + LANES * i + lane]!;
        stay[lane] = 1 - p[lane]!;
      }
      if (p.every((chance) => chance === 0)) continue;
      const size = reals[(sizes >> 3) + i]!;
      if (hasSpilled) moveOverflow(overflow, size);
      if (high + step + reach > top) {
        spill(rows, low, high, top, step, reach, size - second - 2 * third, weight, overflow);
        hasSpilled = true;
      }
      high = Math.min(high + step + reach, top);
      work += LANES * (high - low + 1);
      const from = rows + LANES * high;
      const to = rows + LANES * low;
      const isLikely = stay.some((chance) => chance < PLAIN_BELOW);
      for (let lane = 0; lane < LANES; lane++) {
        const part = isLikely ? p[lane]! : p[lane]! / stay[lane]!;
        if (!isLikely) scale[lane]! *= stay[lane]!;
        const keep = isLikely ? stay[lane]! : 1;
        const first = part * reals[weight]!;
        sweep(from + lane, to + lane, LANES * step, keep, first, part * second, part * third);
      }
      if (!isLikely && scale.some((factor) => factor < SMALLEST_SCALE)) {
        multiply(from, to);
        scale.fill(1);
      }
      for (; high > low && isNegligible(rows + LANES * high, negligible); high--)
        reals.fill(0, rows + LANES * high, rows + LANES * (high + 1));
      for (; low < high && isNegligible(rows + LANES * low, negligible); low++)
        reals.fill(0, rows + LANES * low, rows + LANES * (low + 1));
    }
    multiply(rows + LANES * high, rows + LANES * low);
    wholes[bounds >> 2] = low;
    wholes[(bounds >> 2) + 1] = high;
  };

  const collect: RecursionBackend["collect"] = (
    rows,
    low,
    high,
    law,
    segments,
    breaks,
    masses,
    momentsAt,
    stride,
  ) => {
    let u = low;
    for (let segment = 0; segment < segments; segment++) {
      const next = segment + 1 < segments ? wholes[(breaks >> 2) + segment + 1]! : high + 1;
      const end = Math.min(next, high + 1);
      const massAt = (masses + segment * stride) >> 3;
      const momentAt = (momentsAt + segment * stride) >> 3;
      reals.fill(0, massAt, massAt + LANES);
      reals.fill(0, momentAt, momentAt + LANES);
      for (; u < end; u++) {
        const row = (rows >> 3) + LANES * u;
        for (let lane = 0; lane < LANES; lane++) {
          const mass = reals[row + lane]!;
          reals[massAt + lane]! += mass;
          reals[momentAt + lane]! += u * mass;
        }
        reals[(law >> 3) + u]! += reals[row]! + reals[row + 2]! + (reals[row + 1]! + reals[row + 3]!);
        reals.fill(0, row, row + LANES);
      }
    }
  };

  const moments: RecursionBackend["moments"] = (count, scaled, slopes, sizes, factors, table, out) => {
    for (let lane = 0; lane < 2; lane++) {
      const at = reals[(factors >> 3) + lane]!;
      let mean = 0;
      let variance = 0;
      let slope = 0;
      for (let i = 0; i < count; i++) {
        const steepness = reals[(slopes >> 3) + i]!;
        const x = reals[(scaled >> 3) + i]! - steepness * at;
        const size = reals[(sizes >> 3) + i]!;
        const chance = normalCdf(x, table);
        mean += size * chance;
        variance += size * size * (chance * (1 - chance));
        const index = (Math.min(Math.max(x, TABLE_LOW), TABLE_HIGH) * 64 + 832.5) | 0;
        slope += size * steepness * reals[(table >> 3) + 2 * index + 1]!;
      }
      reals[(out >> 3) + lane] = mean;
      reals[(out >> 3) + 2 + lane] = variance;
      reals[(out >> 3) + 4 + lane] = slope;
    }
  };

  const cumulants: RecursionBackend["cumulants"] = (count, scaled, slopes, sizes, factors, table, out) => {
    for (let lane = 0; lane < 2; lane++) {
      const at = reals[(factors >> 3) + lane]!;
      let first = 0;
      let second = 0;
      let third = 0;
      let fourth = 0;
      for (let i = 0; i < count; i++) {
        const x = reals[(scaled >> 3) + i]! - reals[(slopes >> 3) + i]! * at;
        const size = reals[(sizes >> 3) + i]!;
        const chance = normalCdf(x, table);
        const spread = chance * (1 - chance);
        const square = size * size;
        const weighted = square * spread;
        first += size * chance;
        second += weighted;
        third += weighted * size * (1 - (chance + chance));
        fourth += weighted * square * (1 - 6 * spread);
      }
      reals[(out >> 3) + lane] = first;
      reals[(out >> 3) + 2 + lane] = second;
      reals[(out >> 3) + 4 + lane] = third;
      reals[(out >> 3) + 6 + lane] = fourth;
    }
  };

  return {
    kind: "twin",
    memory: () => reals.buffer,
    reserve: (bytes) => {
      if (bytes <= reals.byteLength) return;
      const larger = new Float64Array(Math.ceil(bytes / 8));
      larger.set(reals);
      reals = larger;
      wholes = new Int32Array(larger.buffer);
    },
    conditional,
    addNames,
    collect,
    moments,
    cumulants,
    takeWork: () => {
      const done = work;
      work = 0;
      return done;
    },
  };
}
