const HALF_ROOT = Math.SQRT1_2;

/**
 * One radix-8 stage of Stockham's autosort transform (decimation in frequency): a third fewer passes over memory than
 * radix 4. `length` is what is left to transform, `stride` how many transforms lie side by side; complex values with
 * real and imaginary part side by side.
 */
export function radix8(
  data: Float64Array,
  next: Float64Array,
  twiddle: Float64Array,
  length: number,
  stride: number,
): void {
  const eighth = (length * stride) / 4;
  const step = 2 * stride;
  for (let start = 0; start < eighth; start += step) {
    const w1r = twiddle[start] ?? 0;
    const w1i = twiddle[start + 1] ?? 0;
    const w2r = w1r * w1r - w1i * w1i;
    const w2i = 2 * w1r * w1i;
    const w3r = w1r * w2r - w1i * w2i;
    const w3i = w1r * w2i + w1i * w2r;
    const w4r = w2r * w2r - w2i * w2i;
    const w4i = 2 * w2r * w2i;
    const w5r = w1r * w4r - w1i * w4i;
    const w5i = w1r * w4i + w1i * w4r;
    const w6r = w3r * w3r - w3i * w3i;
    const w6i = 2 * w3r * w3i;
    const w7r = w3r * w4r - w3i * w4i;
    const w7i = w3r * w4i + w3i * w4r;
    const end = start + step;
    for (let i = start, o = 8 * start; i < end; i += 2, o += 2) {
      const x0r = data[i] ?? 0;
      const x0i = data[i + 1] ?? 0;
      const x4r = data[i + 4 * eighth] ?? 0;
      const x4i = data[i + 4 * eighth + 1] ?? 0;
      const x2r = data[i + 2 * eighth] ?? 0;
      const x2i = data[i + 2 * eighth + 1] ?? 0;
      const x6r = data[i + 6 * eighth] ?? 0;
      const x6i = data[i + 6 * eighth + 1] ?? 0;
      const a0r = x0r + x4r;
      const a0i = x0i + x4i;
      const a1r = x0r - x4r;
      const a1i = x0i - x4i;
      const a2r = x2r + x6r;
      const a2i = x2i + x6i;
      const a3r = x2i - x6i;
      const a3i = x6r - x2r;
      const e0r = a0r + a2r;
      const e0i = a0i + a2i;
      const e2r = a0r - a2r;
      const e2i = a0i - a2i;
      const e1r = a1r + a3r;
      const e1i = a1i + a3i;
      const e3r = a1r - a3r;
      const e3i = a1i - a3i;
      const x1r = data[i + eighth] ?? 0;
      const x1i = data[i + eighth + 1] ?? 0;
      const x5r = data[i + 5 * eighth] ?? 0;
      const x5i = data[i + 5 * eighth + 1] ?? 0;
      const x3r = data[i + 3 * eighth] ?? 0;
      const x3i = data[i + 3 * eighth + 1] ?? 0;
      const x7r = data[i + 7 * eighth] ?? 0;
      const x7i = data[i + 7 * eighth + 1] ?? 0;
      const b0r = x1r + x5r;
      const b0i = x1i + x5i;
      const b1r = x1r - x5r;
      const b1i = x1i - x5i;
      const b2r = x3r + x7r;
      const b2i = x3i + x7i;
      const b3r = x3i - x7i;
      const b3i = x7r - x3r;
      const f0r = b0r + b2r;
      const f0i = b0i + b2i;
      const f2r = b0i - b2i;
      const f2i = b2r - b0r;
      const g1r = b1r + b3r;
      const g1i = b1i + b3i;
      const g3r = b1r - b3r;
      const g3i = b1i - b3i;
      const f1r = HALF_ROOT * (g1r + g1i);
      const f1i = HALF_ROOT * (g1i - g1r);
      const f3r = HALF_ROOT * (g3i - g3r);
      const f3i = -HALF_ROOT * (g3r + g3i);
      next[o] = e0r + f0r;
      next[o + 1] = e0i + f0i;
      const y4r = e0r - f0r;
      const y4i = e0i - f0i;
      next[o + 4 * step] = y4r * w4r - y4i * w4i;
      next[o + 4 * step + 1] = y4r * w4i + y4i * w4r;
      const y1r = e1r + f1r;
      const y1i = e1i + f1i;
      next[o + step] = y1r * w1r - y1i * w1i;
      next[o + step + 1] = y1r * w1i + y1i * w1r;
      const y5r = e1r - f1r;
      const y5i = e1i - f1i;
      next[o + 5 * step] = y5r * w5r - y5i * w5i;
      next[o + 5 * step + 1] = y5r * w5i + y5i * w5r;
      const y2r = e2r + f2r;
      const y2i = e2i + f2i;
      next[o + 2 * step] = y2r * w2r - y2i * w2i;
      next[o + 2 * step + 1] = y2r * w2i + y2i * w2r;
      const y6r = e2r - f2r;
      const y6i = e2i - f2i;
      next[o + 6 * step] = y6r * w6r - y6i * w6i;
      next[o + 6 * step + 1] = y6r * w6i + y6i * w6r;
      const y3r = e3r + f3r;
      const y3i = e3i + f3i;
      next[o + 3 * step] = y3r * w3r - y3i * w3i;
      next[o + 3 * step + 1] = y3r * w3i + y3i * w3r;
      const y7r = e3r - f3r;
      const y7i = e3i - f3i;
      next[o + 7 * step] = y7r * w7r - y7i * w7i;
      next[o + 7 * step + 1] = y7r * w7i + y7i * w7r;
    }
  }
}
