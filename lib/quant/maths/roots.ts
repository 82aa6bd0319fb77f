/**
 * Root of a continuous function with a sign change on [low, high], by Brent's method (R. P. Brent, "Algorithms for
 * Minimization Without Derivatives", 1973, chapter 4), to the last bits of x unless a tolerance is given.
 * @throws RangeError when the ends have the same sign.
 */
export function brentRoot(f: (x: number) => number, low: number, high: number, tolerance = 0): number {
  let a = low;
  let b = high;
  let fa = f(a);
  let fb = f(b);
  if (fa === 0) return a;
  if (fb === 0) return b;
  if (fa > 0 === fb > 0) throw new RangeError(`no sign change on [${low}, ${high}]`);
  let c = a;
  let fc = fa;
  let step = b - a;
  let lastStep = step;
  for (let iteration = 0; iteration < 200; iteration++) {
    if (Math.abs(fc) < Math.abs(fb)) {
      a = b;
      b = c;
      c = a;
      fa = fb;
      fb = fc;
      fc = fa;
    }
    const limit = 2 * Number.EPSILON * Math.abs(b) + 0.5 * tolerance;
    const half = 0.5 * (c - b);
    if (Math.abs(half) <= limit || fb === 0) return b;
    if (Math.abs(lastStep) < limit || Math.abs(fa) <= Math.abs(fb)) {
      step = half;
      lastStep = half;
    } else {
      const candidate = interpolationStep(a, b, c, fa, fb, fc);
      if (
        2 * candidate.p <
        Math.min(3 * half * candidate.q - Math.abs(limit * candidate.q), Math.abs(lastStep * candidate.q))
      ) {
        lastStep = step;
        step = candidate.p / candidate.q;
      } else {
        step = half;
        lastStep = half;
      }
    }
    a = b;
    fa = fb;
    b += Math.abs(step) > limit ? step : half > 0 ? limit : -limit;
    fb = f(b);
    if (fb > 0 === fc > 0) {
      c = a;
      fc = fa;
      step = b - a;
      lastStep = step;
    }
  }
  return b;
}

/** Secant or inverse quadratic step p/q from b, with p ≥ 0 (the sign is carried by q). */
function interpolationStep(
  a: number,
  b: number,
  c: number,
  fa: number,
  fb: number,
  fc: number,
): { p: number; q: number } {
  const half = 0.5 * (c - b);
  const s = fb / fa;
  let p: number;
  let q: number;
  if (a === c) {
    p = 2 * half * s;
    q = 1 - s;
  } else {
    const r = fb / fc;
    const t = fa / fc;
    p = s * (2 * half * t * (t - r) - (b - a) * (r - 1));
    q = (t - 1) * (r - 1) * (s - 1);
  }
  return p > 0 ? { p, q: -q } : { p: -p, q };
}

/** A turning point of a function, as an argument and its value. */
export interface Extremum {
  readonly at: number;
  readonly value: number;
}

/** What a scan of a smooth function finds on an interval. */
export interface Scan {
  readonly roots: readonly number[];
  readonly minimum: Extremum;
  readonly maximum: Extremum;
}

/**
 * All roots of a smooth function on [low, high] and its extreme values: a scan of `intervals` equal steps, every
 * inner turning point refined (so that two roots close to a tangent are not missed), then Brent on each change of sign.
 */
export function scanRoots(f: (x: number) => number, low: number, high: number, intervals: number): Scan {
  const points: Extremum[] = [];
  for (let i = 0; i <= intervals; i++) {
    const at = i === intervals ? high : low + ((high - low) * i) / intervals;
    points.push({ at, value: f(at) });
  }
  const refined: Extremum[] = [points[0]!];
  for (let i = 1; i < points.length; i++) {
    const before = points[i - 1]!;
    const here = points[i]!;
    const after = points[i + 1];
    if (after && (here.value - before.value) * (after.value - here.value) <= 0) {
      const sign = here.value >= before.value ? -1 : 1;
      const turning = goldenMinimum((x) => sign * f(x), before.at, after.at);
      const extremum = { at: turning, value: f(turning) };
      const known = refined[refined.length - 1]!;
      if (extremum.at > known.at && extremum.at < here.at) refined.push(extremum, here);
      else if (extremum.at > here.at) refined.push(here, extremum);
      else refined.push(here);
    } else refined.push(here);
  }
  refined.sort((one, other) => one.at - other.at);
  const roots: number[] = [];
  for (let i = 0; i < refined.length; i++) {
    const here = refined[i]!;
    const next = refined[i + 1];
    if (here.value === 0) roots.push(here.at);
    else if (next && next.value !== 0 && here.value > 0 !== next.value > 0) {
      roots.push(brentRoot(f, here.at, next.at));
    }
  }
  let minimum = refined[0]!;
  let maximum = refined[0]!;
  for (const point of refined) {
    if (point.value < minimum.value) minimum = point;
    if (point.value > maximum.value) maximum = point;
  }
  return { roots: roots.filter((root, i) => i === 0 || root > roots[i - 1]!), minimum, maximum };
}

const GOLDEN = 0.3819660112501051;

/** Argument of the minimum of a function with one dip on [low, high], by Brent's parabolas and golden sections. */
export function goldenMinimum(f: (x: number) => number, low: number, high: number): number {
  let a = low;
  let b = high;
  let x = a + GOLDEN * (b - a);
  let w = x;
  let v = x;
  let fx = f(x);
  let fw = fx;
  let fv = fx;
  let step = 0;
  let lastStep = 0;
  for (let iteration = 0; iteration < 100; iteration++) {
    const middle = 0.5 * (a + b);
    const limit = 1e-9 * Math.abs(x) + 1e-12;
    if (Math.abs(x - middle) <= 2 * limit - 0.5 * (b - a)) break;
    const r = (x - w) * (fx - fv);
    const s = (x - v) * (fx - fw);
    let p = (x - v) * s - (x - w) * r;
    let q = 2 * (s - r);
    if (q > 0) p = -p;
    q = Math.abs(q);
    const before = lastStep;
    lastStep = step;
    const isUsable = Math.abs(p) < Math.abs(0.5 * q * before) && p > q * (a - x) && p < q * (b - x);
    if (isUsable && Math.abs(before) > limit) step = p / q;
    else {
      lastStep = x >= middle ? a - x : b - x;
      step = GOLDEN * lastStep;
    }
    const u = x + (Math.abs(step) >= limit ? step : step > 0 ? limit : -limit);
    const fu = f(u);
    if (fu <= fx) {
      if (u >= x) a = x;
      else b = x;
      v = w;
      fv = fw;
      w = x;
      fw = fx;
      x = u;
      fx = fu;
    } else {
      if (u < x) a = u;
      else b = u;
      if (fu <= fw || w === x) {
        v = w;
        fv = fw;
        w = u;
        fw = fu;
      } else if (fu <= fv || v === x || v === w) {
        v = u;
        fv = fu;
      }
    }
  }
  return x;
}
