/**
 * The inner loop of Loadline in AssemblyScript: the conditional law of a sum of independent defaults on a grid, four factor
 * values side by side in two f64x2 vectors. Its twin in plain TypeScript, `../twin.ts`, does the same operations in the
 * same order, so that both give the same bits. Nothing is fused or relaxed. All pointers are byte offsets.
 *
 * A row holds the four values' masses of one grid step (32 bytes); rows stand in ascending order of steps, with rows of
 * zeros below row 0 for the longest step of a name. After a change: `npm run kernel`.
 */

/** Φ and φ are tabulated every 1/64 from −13 to 9 and read by a Taylor step of degree five. */
const TABLE_LOW: f64 = -13;
const TABLE_HIGH: f64 = 9;
const ROW: usize = 32;

@inline
function load2(at: usize): v128 {
  return v128.load(at);
}

@inline
function store2(at: usize, value: v128): void {
  v128.store(at, value);
}

@inline
function plus(one: v128, other: v128): v128 {
  return f64x2.add(one, other);
}

@inline
function times(one: v128, other: v128): v128 {
  return f64x2.mul(one, other);
}

@inline
function twice(value: f64): v128 {
  return f64x2.splat(value);
}

/** Φ of two numbers; 0 below −13, 1 above 9. */
@inline
function normalCdf(x: v128, table: usize): v128 {
  const inside = f64x2.min(f64x2.max(x, twice(TABLE_LOW)), twice(TABLE_HIGH));
  const index = i32x4.trunc_sat_f64x2_s_zero(plus(times(inside, twice(64)), twice(832.5)));
  const near = f64x2.sub(times(f64x2.convert_low_i32x4_s(index), twice(0.015625)), twice(13));
  const step = f64x2.sub(inside, near);
  const square = times(near, near);
  const one = load2(table + (<usize>i32x4.extract_lane(index, 0) << 4));
  const other = load2(table + (<usize>i32x4.extract_lane(index, 1) << 4));
  const value = v128.shuffle<f64>(one, other, 0, 2);
  const density = v128.shuffle<f64>(one, other, 1, 3);
  const fifth = times(plus(times(f64x2.sub(square, twice(6)), square), twice(3)), twice(1.0 / 120.0));
  const cube = times(times(near, f64x2.sub(twice(3), square)), twice(1.0 / 24.0));
  const fourth = plus(cube, times(step, fifth));
  const third = plus(times(f64x2.sub(square, twice(1)), twice(1.0 / 6.0)), times(step, fourth));
  const second = plus(times(twice(-0.5), near), times(step, third));
  const series = plus(twice(1), times(step, second));
  return plus(value, times(times(density, step), series));
}

/** probabilities[name][4] = Φ(scaled − slope · factor). */
export function conditional(
  count: i32,
  scaled: usize,
  slopes: usize,
  factors: usize,
  table: usize,
  probabilities: usize,
): void {
  const factorsP = load2(factors);
  const factorsQ = load2(factors + 16);
  for (let i: i32 = 0; i < count; i++) {
    const threshold = v128.load64_splat(scaled + (<usize>i << 3));
    const slope = v128.load64_splat(slopes + (<usize>i << 3));
    const out = probabilities + (<usize>i << 5);
    store2(out, normalCdf(f64x2.sub(threshold, times(slope, factorsP)), table));
    store2(out + 16, normalCdf(f64x2.sub(threshold, times(slope, factorsQ)), table));
  }
}

/** Whether all four masses of a row are below their thresholds in size. */
@inline
function isNegligible(row: usize, scaleP: v128, scaleQ: v128, least: v128): bool {
  const isSmallP = f64x2.lt(times(f64x2.abs(load2(row)), scaleP), least);
  const isSmallQ = f64x2.lt(times(f64x2.abs(load2(row + 16)), scaleQ), least);
  return i64x2.all_true(v128.and(isSmallP, isSmallQ));
}

@inline
function clear(row: usize): void {
  store2(row, twice(0));
  store2(row + 16, twice(0));
}

/** Multiplies rows by a factor a value. */
function multiply(from: usize, to: usize, p: v128, q: v128): void {
  for (let row = from; row >= to; row -= ROW) {
    store2(row, times(p, load2(row)));
    v128.store(row, times(q, v128.load(row, 16)), 16);
  }
}

/** rows[u] += odds · rows[u − shift]: a name with one landing point. */
function addOne(from: usize, to: usize, shift: usize, p: v128, q: v128): void {
  let row = from;
  for (; row > to; row -= 2 * ROW) {
    const source = row - shift;
    store2(row, plus(load2(row), times(p, load2(source))));
    v128.store(row, plus(v128.load(row, 16), times(q, v128.load(source, 16))), 16);
    store2(row - 32, plus(load2(row - 32), times(p, load2(source - 32))));
    store2(row - 16, plus(load2(row - 16), times(q, load2(source - 16))));
  }
  if (row == to) {
    store2(row, plus(load2(row), times(p, load2(row - shift))));
    v128.store(row, plus(v128.load(row, 16), times(q, v128.load(row - shift, 16))), 16);
  }
}

/** A name shared between two neighbouring landing points; the lower row of one step is the upper row of the next. */
function addTwo(from: usize, to: usize, shift: usize, p1: v128, q1: v128, p2: v128, q2: v128): void {
  let row = from;
  let source = from - shift;
  let highP = load2(source);
  let highQ = v128.load(source, 16);
  for (; row > to; row -= 2 * ROW) {
    source -= 2 * ROW;
    const lowP = v128.load(source, 32);
    const lowQ = v128.load(source, 48);
    store2(row, plus(plus(load2(row), times(p1, highP)), times(p2, lowP)));
    v128.store(row, plus(plus(v128.load(row, 16), times(q1, highQ)), times(q2, lowQ)), 16);
    highP = load2(source);
    highQ = v128.load(source, 16);
    store2(row - 32, plus(plus(load2(row - 32), times(p1, lowP)), times(p2, highP)));
    store2(row - 16, plus(plus(load2(row - 16), times(q1, lowQ)), times(q2, highQ)));
  }
  if (row == to) {
    source -= ROW;
    store2(row, plus(plus(load2(row), times(p1, highP)), times(p2, load2(source))));
    v128.store(row, plus(plus(v128.load(row, 16), times(q1, highQ)), times(q2, v128.load(source, 16))), 16);
  }
}

/** Half a row of a name shared between three neighbouring landing points. */
function addThree(from: usize, to: usize, shift: usize, one: v128, two: v128, three: v128): void {
  let row = from;
  let source = from - shift;
  let high = load2(source);
  let middle = load2(source - ROW);
  source -= ROW;
  for (; row > to; row -= 2 * ROW) {
    source -= 2 * ROW;
    const low = v128.load(source, 32);
    store2(row, plus(plus(plus(load2(row), times(one, high)), times(two, middle)), times(three, low)));
    const lowest = load2(source);
    store2(row - 32, plus(plus(plus(load2(row - 32), times(one, middle)), times(two, low)), times(three, lowest)));
    high = low;
    middle = lowest;
  }
  if (row == to) {
    const low = load2(source - ROW);
    store2(row, plus(plus(plus(load2(row), times(one, high)), times(two, middle)), times(three, low)));
  }
}

/** Half a row of a name with its chance of survival, for names likely to default: odds would be without bound. */
function addLikely(
  from: usize,
  to: usize,
  shift: usize,
  stay: v128,
  one: v128,
  two: v128,
  three: v128,
): void {
  let source = from - shift;
  let high = load2(source);
  let middle = load2(source - ROW);
  source -= ROW;
  for (let row = from; row >= to; row -= ROW) {
    source -= ROW;
    const low = load2(source);
    store2(row, plus(plus(plus(times(stay, load2(row)), times(one, high)), times(two, middle)), times(three, low)));
    high = middle;
    middle = low;
  }
}

/**
 * Adds to `overflow` (four masses, four sums of steps times mass) what a name sends above `top`. `base` is its first landing
 * point, not clamped; p and q its default probabilities times what a row stands for.
 */
function spill(
  rows: usize,
  low: i32,
  high: i32,
  top: i32,
  steps: i32,
  reach: i32,
  base: f64,
  p: v128,
  q: v128,
  weights: usize,
  overflow: usize,
): void {
  let sumP = twice(0);
  let sumQ = twice(0);
  let momentP = twice(0);
  let momentQ = twice(0);
  let next = high;
  for (let landing: i32 = 0; landing <= reach; landing++) {
    const least = max(low, top - steps - landing + 1);
    for (; next >= least; next--) {
      const row = rows + (<usize>next << 5);
      const at = twice(<f64>next);
      const massP = load2(row);
      const massQ = load2(row + 16);
      sumP = plus(sumP, massP);
      sumQ = plus(sumQ, massQ);
      momentP = plus(momentP, times(at, massP));
      momentQ = plus(momentQ, times(at, massQ));
    }
    const weight = v128.load64_splat(weights + (<usize>landing << 3));
    const place = twice(base + <f64>landing);
    const shareP = times(p, weight);
    const shareQ = times(q, weight);
    store2(overflow, plus(load2(overflow), times(shareP, sumP)));
    v128.store(overflow, plus(v128.load(overflow, 16), times(shareQ, sumQ)), 16);
    const furtherP = times(shareP, plus(momentP, times(place, sumP)));
    const furtherQ = times(shareQ, plus(momentQ, times(place, sumQ)));
    v128.store(overflow, plus(v128.load(overflow, 32), furtherP), 32);
    v128.store(overflow, plus(v128.load(overflow, 48), furtherQ), 48);
  }
}

/** A name of `size` moves on what already lies above the top. */
function moveOverflow(overflow: usize, size: f64, p: v128, q: v128): void {
  const furtherP = times(times(p, twice(size)), load2(overflow));
  const furtherQ = times(times(q, twice(size)), v128.load(overflow, 16));
  v128.store(overflow, plus(v128.load(overflow, 32), furtherP), 32);
  v128.store(overflow, plus(v128.load(overflow, 48), furtherQ), 48);
}

/** Row updates times values done so far: the machine-independent measure of the work. */
let work: f64 = 0;

export function takeWork(): f64 {
  const done = work;
  work = 0;
  return done;
}

/** Below this chance of survival a name is added with its rows multiplied, else by its odds of default. */
const PLAIN_BELOW: f64 = 0.015625;
/** Rows that stand for less than this much of themselves are multiplied out. */
const SMALLEST_SCALE: f64 = 1e-100;

@inline
function isBelow(p: v128, q: v128, least: f64): bool {
  return v128.any_true(v128.or(f64x2.lt(p, twice(least)), f64x2.lt(q, twice(least))));
}

/**
 * Adds `count` names to four conditional laws. Row 0 holds each value's starting mass, every other row is zero; `steps`
 * (i32) and `weights` (three f64 a name) say where a name lands, `sizes` its amount in steps. Leaves the laws in the rows
 * `bounds[0]..bounds[1]`, and in `overflow` the masses above `top` and their sums of steps times mass. A name multiplies a law by (1 − p)(1 + odds · its landing points): the factors
 * 1 − p are gathered in `scale` and applied last, which saves a multiplication a row.
 */
export function addNames(
  count: i32,
  top: i32,
  negligible: f64,
  rows: usize,
  steps: usize,
  weights: usize,
  sizes: usize,
  probabilities: usize,
  overflow: usize,
  bounds: usize,
): void {
  let low: i32 = 0;
  let high: i32 = 0;
  let done: i32 = 0;
  let scaleP = twice(1);
  let scaleQ = twice(1);
  let hasSpilled = false;
  clear(overflow);
  clear(overflow + 32);
  for (let i: i32 = 0; i < count; i++) {
    const step = load<i32>(steps + (<usize>i << 2));
    const weight = weights + <usize>i * 24;
    const second = load<f64>(weight, 8);
    const third = load<f64>(weight, 16);
    const reach: i32 = third != 0 ? 2 : second != 0 ? 1 : 0;
    const at = probabilities + (<usize>i << 5);
    let p = load2(at);
    let q = load2(at + 16);
    if (!v128.any_true(v128.or(p, q))) continue;
    const size = load<f64>(sizes + (<usize>i << 3));
    if (hasSpilled) moveOverflow(overflow, size, p, q);
    if (high + step + reach > top) {
      const base = size - second - 2 * third;
      spill(rows, low, high, top, step, reach, base, times(scaleP, p), times(scaleQ, q), weight, overflow);
      hasSpilled = true;
    }
    const stayP = f64x2.sub(twice(1), p);
    const stayQ = f64x2.sub(twice(1), q);
    high = min(high + step + reach, top);
    done += high - low + 1;
    const from = rows + (<usize>high << 5);
    const to = rows + (<usize>low << 5);
    const shift = <usize>step << 5;
    const one = v128.load64_splat(weight);
    const two = v128.load64_splat(weight, 8);
    const three = v128.load64_splat(weight, 16);
    if (isBelow(stayP, stayQ, PLAIN_BELOW)) {
      addLikely(from, to, shift, stayP, times(p, one), times(p, two), times(p, three));
      addLikely(from + 16, to + 16, shift, stayQ, times(q, one), times(q, two), times(q, three));
    } else {
      p = f64x2.div(p, stayP);
      q = f64x2.div(q, stayQ);
      scaleP = times(scaleP, stayP);
      scaleQ = times(scaleQ, stayQ);
      if (reach == 0) {
        addOne(from, to, shift, p, q);
      } else if (reach == 1) {
        addTwo(from, to, shift, times(p, one), times(q, one), times(p, two), times(q, two));
      } else {
        addThree(from, to, shift, times(p, one), times(p, two), times(p, three));
        addThree(from + 16, to + 16, shift, times(q, one), times(q, two), times(q, three));
      }
      if (isBelow(scaleP, scaleQ, SMALLEST_SCALE)) {
        multiply(from, to, scaleP, scaleQ);
        scaleP = twice(1);
        scaleQ = twice(1);
      }
    }
    for (; high > low && isNegligible(rows + (<usize>high << 5), scaleP, scaleQ, twice(negligible)); high--)
      clear(rows + (<usize>high << 5));
    for (; low < high && isNegligible(rows + (<usize>low << 5), scaleP, scaleQ, twice(negligible)); low++)
      clear(rows + (<usize>low << 5));
  }
  multiply(rows + (<usize>high << 5), rows + (<usize>low << 5), scaleP, scaleQ);
  work += <f64>done * 4.0;
  store<i32>(bounds, low);
  store<i32>(bounds, high, 4);
}

/**
 * Takes four laws apart and clears their rows. Adds each row's four masses to `law`; writes for every segment of rows
 * (`breaks`: first rows, ascending, from 0) and value the mass and the sum of steps times mass, at `masses` and
 * `moments`: [segment][stride] f64.
 */
export function collect(
  rows: usize,
  low: i32,
  high: i32,
  law: usize,
  segments: i32,
  breaks: usize,
  masses: usize,
  moments: usize,
  stride: usize,
): void {
  let segment: i32 = 0;
  let massP = twice(0);
  let massQ = twice(0);
  let momentP = twice(0);
  let momentQ = twice(0);
  let u = low;
  while (segment < segments) {
    const end = segment + 1 < segments ? min(load<i32>(breaks + (<usize>(segment + 1) << 2)), high + 1) : high + 1;
    for (; u < end; u++) {
      const row = rows + (<usize>u << 5);
      const p = load2(row);
      const q = load2(row + 16);
      massP = plus(massP, p);
      massQ = plus(massQ, q);
      const at = twice(<f64>u);
      momentP = plus(momentP, times(at, p));
      momentQ = plus(momentQ, times(at, q));
      const both = plus(p, q);
      const place = law + (<usize>u << 3);
      store<f64>(place, load<f64>(place) + (f64x2.extract_lane(both, 0) + f64x2.extract_lane(both, 1)));
      clear(row);
    }
    const offset = <usize>segment * stride;
    store2(masses + offset, massP);
    store2(masses + offset + 16, massQ);
    store2(moments + offset, momentP);
    store2(moments + offset + 16, momentQ);
    massP = twice(0);
    massQ = twice(0);
    momentP = twice(0);
    momentQ = twice(0);
    segment++;
  }
}

/**
 * What the conditional sum of `sizes` looks like at two factor values: [mean][variance][slope of the mean over the
 * factor, sign turned] for each, at `out`.
 */
export function moments(
  count: i32,
  scaled: usize,
  slopes: usize,
  sizes: usize,
  factors: usize,
  table: usize,
  out: usize,
): void {
  const at = load2(factors);
  let mean = twice(0);
  let variance = twice(0);
  let slope = twice(0);
  for (let i: i32 = 0; i < count; i++) {
    const steepness = v128.load64_splat(slopes + (<usize>i << 3));
    const x = f64x2.sub(v128.load64_splat(scaled + (<usize>i << 3)), times(steepness, at));
    const size = v128.load64_splat(sizes + (<usize>i << 3));
    const p = normalCdf(x, table);
    mean = plus(mean, times(size, p));
    variance = plus(variance, times(times(size, size), times(p, f64x2.sub(twice(1), p))));
    slope = plus(slope, times(times(size, steepness), tabulatedDensity(x, table)));
  }
  store2(out, mean);
  store2(out + 16, variance);
  store2(out + 32, slope);
}

/** φ of two numbers to within the table's step; 0 at its ends. */
@inline
function tabulatedDensity(x: v128, table: usize): v128 {
  const inside = f64x2.min(f64x2.max(x, twice(TABLE_LOW)), twice(TABLE_HIGH));
  const index = i32x4.trunc_sat_f64x2_s_zero(plus(times(inside, twice(64)), twice(832.5)));
  const one = load2(table + (<usize>i32x4.extract_lane(index, 0) << 4));
  const other = load2(table + (<usize>i32x4.extract_lane(index, 1) << 4));
  return v128.shuffle<f64>(one, other, 1, 3);
}

/** First four cumulants of the conditional sum of `sizes` at two factor values: [mean][second][third][fourth] for each. */
export function cumulants(
  count: i32,
  scaled: usize,
  slopes: usize,
  sizes: usize,
  factors: usize,
  table: usize,
  out: usize,
): void {
  const at = load2(factors);
  let first = twice(0);
  let second = twice(0);
  let third = twice(0);
  let fourth = twice(0);
  for (let i: i32 = 0; i < count; i++) {
    const steepness = v128.load64_splat(slopes + (<usize>i << 3));
    const x = f64x2.sub(v128.load64_splat(scaled + (<usize>i << 3)), times(steepness, at));
    const size = v128.load64_splat(sizes + (<usize>i << 3));
    const p = normalCdf(x, table);
    const spread = times(p, f64x2.sub(twice(1), p));
    const square = times(size, size);
    const weighted = times(square, spread);
    first = plus(first, times(size, p));
    second = plus(second, weighted);
    third = plus(third, times(times(weighted, size), f64x2.sub(twice(1), plus(p, p))));
    fourth = plus(fourth, times(times(weighted, square), f64x2.sub(twice(1), times(twice(6), spread))));
  }
  store2(out, first);
  store2(out + 16, second);
  store2(out + 32, third);
  store2(out + 48, fourth);
}
