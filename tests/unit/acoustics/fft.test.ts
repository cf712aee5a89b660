import { describe, expect, it } from "vitest";
import { RealPowerFft } from "@/lib/science/acoustics/fft";
import { noise } from "./wav-bytes";

/** |X[k]|² by the definition of the discrete Fourier transform. */
function byDefinition(samples: Float64Array, k: number): number {
  let re = 0;
  let im = 0;
  samples.forEach((value, i) => {
    const angle = (2 * Math.PI * ((k * i) % samples.length)) / samples.length;
    re += value * Math.cos(angle);
    im -= value * Math.sin(angle);
  });
  return re * re + im * im;
}

describe("power spectrum of a real block", () => {
  // Every remainder that radix 4 and radix 8 leave: parts of 1, 2, 4, 8, 16, 32, … complex values.
  it.each([8, 16, 32, 64, 128, 256, 512, 1024])("equals the definition of the transform for %d samples", (length) => {
    const samples = noise(length, length, 1);
    const power = new Float64Array(length / 2 + 1);
    new RealPowerFft(length).addPower(samples, 0, new Float64Array(length).fill(1), 0, power);
    power.forEach((value, k) => expect(Math.abs(value - byDefinition(samples, k))).toBeLessThan(1e-9 * length));
  });

  it("adds to what is there, takes the offset out and starts where it is told", () => {
    const samples = noise(1, 80, 1).map((value) => value + 3);
    const window = noise(2, 64, 1);
    const power = new Float64Array(33).fill(5);
    new RealPowerFft(64).addPower(samples, 16, window, 3, power);
    const block = Float64Array.from(window, (weight, i) => weight * ((samples[16 + i] ?? 0) - 3));
    power.forEach((value, k) => expect(value).toBeCloseTo(5 + byDefinition(block, k), 8));
  });

  it("refuses lengths that are no power of two or under 8", () => {
    for (const length of [0, 4, 12, 100]) expect(() => new RealPowerFft(length)).toThrow(RangeError);
  });
});
