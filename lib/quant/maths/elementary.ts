/**
 * Exponential and logarithm that give the same bits on every platform: they use only + − × ÷ and the bits of a
 * double. Algorithms and constants after fdlibm's e_exp.c, e_log.c, s_expm1.c and s_log1p.c:
 *
 *   Copyright (C) 1993 by Sun Microsystems, Inc. All rights reserved.
 *   Developed at SunPro, a Sun Microsystems, Inc. business.
 *   Permission to use, copy, modify, and distribute this software is freely granted,
 *   provided that this notice is preserved.
 */
const bits = new DataView(new ArrayBuffer(8));

const LN2_HIGH = 6.9314718036912381649e-1;
const LN2_LOW = 1.90821492927058770002e-10;
const INVERSE_LN2 = 1.442695040888963387;
const TWO_54 = 18014398509481984;

function highWord(x: number): number {
  bits.setFloat64(0, x);
  return bits.getInt32(0);
}

/** x · 2^n for results that may overflow to infinity or fall into the subnormal range. */
function scale(x: number, n: number): number {
  if (n >= -1021 && n <= 1023) return x * powerOfTwo(n);
  if (n > 1023) return x * powerOfTwo(1023) * powerOfTwo(n - 1023);
  return x * powerOfTwo(n + 1000) * powerOfTwo(-1000);
}

function powerOfTwo(n: number): number {
  if (n > 1023) return Number.POSITIVE_INFINITY;
  bits.setUint32(0, (n + 1023) << 20);
  bits.setUint32(4, 0);
  return bits.getFloat64(0);
}

/** e^x, error below 1 ulp. */
export function exp(x: number): number {
  if (Number.isNaN(x)) return x;
  if (x > 709.782712893383973096) return Number.POSITIVE_INFINITY;
  if (x < -745.13321910194110842) return 0;
  const size = Math.abs(x);
  if (size < 2 ** -28) return 1 + x;
  let high = x;
  let low = 0;
  let k = 0;
  if (size > 0.34657359027997264) {
    if (size < 1.0397207708399179) k = x < 0 ? -1 : 1;
    else k = Math.trunc(INVERSE_LN2 * x + (x < 0 ? -0.5 : 0.5));
    high = x - k * LN2_HIGH;
    low = k * LN2_LOW;
  }
  const r = high - low;
  const t = r * r;
  const c =
    r -
    t *
      (1.66666666666666019037e-1 +
        t *
          (-2.77777777770155933842e-3 +
            t *
              (6.61375632143793436117e-5 + t * (-1.6533902205465251539e-6 + t * 4.13813679705723846039e-8))));
  if (k === 0) return 1 - ((r * c) / (c - 2) - r);
  return scale(1 - (low - (r * c) / (2 - c) - high), k);
}

/** Natural logarithm, error below 1 ulp; −∞ at 0, NaN below. */
export function log(x: number): number {
  if (Number.isNaN(x) || x < 0) return Number.NaN;
  if (x === 0) return Number.NEGATIVE_INFINITY;
  if (x === Number.POSITIVE_INFINITY) return x;
  let k = 0;
  let argument = x;
  if (x < 2.2250738585072014e-308) {
    k -= 54;
    argument *= TWO_54;
  }
  let high = highWord(argument);
  k += (high >> 20) - 1023;
  high &= 0xfffff;
  const shift = (high + 0x95f64) & 0x100000;
  bits.setFloat64(0, argument);
  bits.setInt32(0, high | (shift ^ 0x3ff00000));
  k += shift >> 20;
  const f = bits.getFloat64(0) - 1;
  return logOfMantissa(f, k, high, 0);
}

/** ln((1+f)·2^k) from fdlibm's rational approximation; `correction` is log1p's rounding term. */
function logOfMantissa(f: number, k: number, high: number, correction: number): number {
  if (f === 0) return k === 0 ? 0 : k * LN2_HIGH + (correction + k * LN2_LOW);
  const s = f / (2 + f);
  const z = s * s;
  const w = z * z;
  const even = w * (3.999999999940941908e-1 + w * (2.222219843214978396e-1 + w * 1.531383769920937332e-1));
  const odd =
    z *
    (6.66666666666673513e-1 +
      w * (2.857142874366239149e-1 + w * (1.818357216161805012e-1 + w * 1.479819860511658591e-1)));
  const r = odd + even;
  if (((high - 0x6147a) | (0x6b851 - high)) > 0) {
    const half = 0.5 * f * f;
    if (k === 0) return f - (half - s * (half + r));
    return k * LN2_HIGH - (half - (s * (half + r) + (k * LN2_LOW + correction)) - f);
  }
  if (k === 0) return f - s * (f - r);
  return k * LN2_HIGH - (s * (f - r) - (k * LN2_LOW + correction) - f);
}

/** ln(1 + x), accurate for small x; −∞ at −1, NaN below. Error below 1 ulp. */
export function log1p(x: number): number {
  if (Number.isNaN(x) || x < -1) return Number.NaN;
  if (x === -1) return Number.NEGATIVE_INFINITY;
  if (x === Number.POSITIVE_INFINITY) return x;
  const size = Math.abs(x);
  if (size < 2 ** -54) return x;
  if (size < 2 ** -29) return x - x * x * 0.5;
  if (x > -0.2928932188134524 && x < 0.41421356237309503) {
    const half = 0.5 * x * x;
    const s = x / (2 + x);
    const z = s * s;
    return x - (half - s * (half + log1pSeries(z)));
  }
  const u = x < 9007199254740992 ? 1 + x : x;
  let high = highWord(u);
  let k = (high >> 20) - 1023;
  const rounding = x < 9007199254740992 ? (k > 0 ? 1 - (u - x) : x - (u - 1)) / u : 0;
  high &= 0xfffff;
  bits.setFloat64(0, u);
  if (high < 0x6a09e) {
    bits.setInt32(0, high | 0x3ff00000);
  } else {
    k += 1;
    bits.setInt32(0, high | 0x3fe00000);
  }
  const f = bits.getFloat64(0) - 1;
  if (f === 0) return k * LN2_HIGH + (rounding + k * LN2_LOW);
  const half = 0.5 * f * f;
  const s = f / (2 + f);
  const r = log1pSeries(s * s);
  return k * LN2_HIGH - (half - (s * (half + r) + (k * LN2_LOW + rounding)) - f);
}

function log1pSeries(z: number): number {
  return (
    z *
    (6.66666666666673513e-1 +
      z *
        (3.999999999940941908e-1 +
          z *
            (2.857142874366239149e-1 +
              z *
                (2.222219843214978396e-1 +
                  z *
                    (1.818357216161805012e-1 +
                      z * (1.531383769920937332e-1 + z * 1.479819860511658591e-1))))))
  );
}

/** e^x − 1, accurate for small x. Error below 1 ulp. */
export function expm1(x: number): number {
  if (Number.isNaN(x)) return x;
  if (x > 709.782712893383973096) return Number.POSITIVE_INFINITY;
  if (x < -38.816242) return -1;
  const size = Math.abs(x);
  if (size < 2 ** -54) return x;
  let argument = x;
  let correction = 0;
  let k = 0;
  if (size > 0.34657359027997264) {
    if (size < 1.0397207708399179) k = x < 0 ? -1 : 1;
    else k = Math.trunc(INVERSE_LN2 * x + (x < 0 ? -0.5 : 0.5));
    const high = x - k * LN2_HIGH;
    const low = k * LN2_LOW;
    argument = high - low;
    correction = high - argument - low;
  }
  const half = 0.5 * argument;
  const hxs = argument * half;
  const r1 =
    1 +
    hxs *
      (-3.33333333333331316428e-2 +
        hxs *
          (1.58730158725481460165e-3 +
            hxs *
              (-7.93650757867487942473e-5 +
                hxs * (4.00821782732936239552e-6 + hxs * -2.01099218183624371326e-7))));
  const t = 3 - r1 * half;
  let e = hxs * ((r1 - t) / (6 - argument * t));
  if (k === 0) return argument - (argument * e - hxs);
  e = argument * (e - correction) - correction - hxs;
  if (k === -1) return 0.5 * (argument - e) - 0.5;
  if (k === 1) return argument < -0.25 ? -2 * (e - (argument + 0.5)) : 1 + 2 * (argument - e);
  if (k <= -2 || k > 56) return scale(1 - (e - argument), k) - 1;
  if (k < 20) return scale(1 - powerOfTwo(-k) - (e - argument), k);
  return scale(argument - (e + powerOfTwo(-k)) + 1, k);
}
