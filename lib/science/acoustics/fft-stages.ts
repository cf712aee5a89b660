import { radix8 } from "./fft-radix8";
/** exp(−2πik/period) for k = 0 … count − 1, real and imaginary part side by side. */
export function unitCircle(count: number, period: number): Float64Array {
  const values = new Float64Array(2 * count);
  for (let k = 0; k < count; k += 1) {
    values[2 * k] = Math.cos((2 * Math.PI * k) / period);
    values[2 * k + 1] = -Math.sin((2 * Math.PI * k) / period);
  }
  return values;
}

/**
 * First radix-4 stage (decimation in frequency) of window·(block − offset), read as complex pairs from `samples`.
 * `data` gets four parts one after the other; part r goes on to give lines r, r + 4, …
 */
export function firstStage(
  data: Float64Array,
  twiddle: Float64Array,
  samples: Float64Array,
  from: number,
  window: Float64Array,
  offset: number,
): void {
  const quarter = data.length / 4;
  for (let i = 0; i < quarter; i += 2) {
    const s = from + i;
    const ar = ((samples[s] ?? 0) - offset) * (window[i] ?? 0);
    const ai = ((samples[s + 1] ?? 0) - offset) * (window[i + 1] ?? 0);
    const br = ((samples[s + quarter] ?? 0) - offset) * (window[i + quarter] ?? 0);
    const bi = ((samples[s + quarter + 1] ?? 0) - offset) * (window[i + quarter + 1] ?? 0);
    const cr = ((samples[s + 2 * quarter] ?? 0) - offset) * (window[i + 2 * quarter] ?? 0);
    const ci = ((samples[s + 2 * quarter + 1] ?? 0) - offset) * (window[i + 2 * quarter + 1] ?? 0);
    const dr = ((samples[s + 3 * quarter] ?? 0) - offset) * (window[i + 3 * quarter] ?? 0);
    const di = ((samples[s + 3 * quarter + 1] ?? 0) - offset) * (window[i + 3 * quarter + 1] ?? 0);
    const w1r = twiddle[i] ?? 0;
    const w1i = twiddle[i + 1] ?? 0;
    const w2r = w1r * w1r - w1i * w1i;
    const w2i = 2 * w1r * w1i;
    const w3r = w1r * w2r - w1i * w2i;
    const w3i = w1r * w2i + w1i * w2r;
    const sr = ar + cr;
    const si = ai + ci;
    const tr = br + dr;
    const ti = bi + di;
    const ur = ar - cr;
    const ui = ai - ci;
    const vr = bi - di;
    const vi = br - dr;
    data[i] = sr + tr;
    data[i + 1] = si + ti;
    const yr = ur + vr;
    const yi = ui - vi;
    data[i + quarter] = yr * w1r - yi * w1i;
    data[i + quarter + 1] = yr * w1i + yi * w1r;
    const xr = sr - tr;
    const xi = si - ti;
    data[i + 2 * quarter] = xr * w2r - xi * w2i;
    data[i + 2 * quarter + 1] = xr * w2i + xi * w2r;
    const zr = ur - vr;
    const zi = ui + vi;
    data[i + 3 * quarter] = zr * w3r - zi * w3i;
    data[i + 3 * quarter + 1] = zr * w3i + zi * w3r;
  }
}

/** Transforms one part in place (through `scratch` of the same size); a length of any power of two, 1 included. */
export function transformPart(values: Float64Array, scratch: Float64Array, twiddle: Float64Array): void {
  let length = values.length / 2;
  let stride = 1;
  let source = values;
  let target = scratch;
  while (length >= 2) {
    const radix = length >= 8 ? 8 : length;
    if (radix === 8) radix8(source, target, twiddle, length, stride);
    else if (radix === 4) radix4(source, target, twiddle, length, stride);
    else radix2(source, target, stride);
    length /= radix;
    stride *= radix;
    const done = target;
    target = source;
    source = done;
  }
  if (source !== values) values.set(source);
}

function radix4(data: Float64Array, next: Float64Array, twiddle: Float64Array, length: number, stride: number): void {
  const quarter = (length * stride) / 2;
  const step = 2 * stride;
  for (let start = 0; start < quarter; start += step) {
    const w1r = twiddle[start] ?? 0;
    const w1i = twiddle[start + 1] ?? 0;
    const w2r = twiddle[2 * start] ?? 0;
    const w2i = twiddle[2 * start + 1] ?? 0;
    const w3r = twiddle[3 * start] ?? 0;
    const w3i = twiddle[3 * start + 1] ?? 0;
    const end = start + step;
    for (let i = start, o = 4 * start; i < end; i += 2, o += 2) {
      const ar = data[i] ?? 0;
      const ai = data[i + 1] ?? 0;
      const br = data[i + quarter] ?? 0;
      const bi = data[i + quarter + 1] ?? 0;
      const cr = data[i + 2 * quarter] ?? 0;
      const ci = data[i + 2 * quarter + 1] ?? 0;
      const dr = data[i + 3 * quarter] ?? 0;
      const di = data[i + 3 * quarter + 1] ?? 0;
      const sr = ar + cr;
      const si = ai + ci;
      const tr = br + dr;
      const ti = bi + di;
      const ur = ar - cr;
      const ui = ai - ci;
      const vr = bi - di;
      const vi = br - dr;
      next[o] = sr + tr;
      next[o + 1] = si + ti;
      const yr = ur + vr;
      const yi = ui - vi;
      next[o + step] = yr * w1r - yi * w1i;
      next[o + step + 1] = yr * w1i + yi * w1r;
      const xr = sr - tr;
      const xi = si - ti;
      next[o + 2 * step] = xr * w2r - xi * w2i;
      next[o + 2 * step + 1] = xr * w2i + xi * w2r;
      const zr = ur - vr;
      const zi = ui + vi;
      next[o + 3 * step] = zr * w3r - zi * w3i;
      next[o + 3 * step + 1] = zr * w3i + zi * w3r;
    }
  }
}

function radix2(data: Float64Array, next: Float64Array, stride: number): void {
  const step = 2 * stride;
  for (let i = 0; i < step; i += 1) {
    const a = data[i] ?? 0;
    const b = data[i + step] ?? 0;
    next[i] = a + b;
    next[i + step] = a - b;
  }
}
