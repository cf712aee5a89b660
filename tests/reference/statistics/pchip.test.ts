import { describe, expect, it } from "vitest";
import { pchip } from "@/lib/science/statistics/pchip";
import values from "../values/pchip.json";

describe(`monotone cubic curve against ${values.source}`, () => {
  it.each(values.curves)("points x = $x", ({ x, y, at, value, slope }) => {
    const curve = pchip(x.map((xi, i) => ({ x: xi, y: y[i] ?? NaN })).reverse());
    at.forEach((xi, i) => {
      expect(curve.value(xi)).toBeCloseTo(value[i] ?? NaN, 11);
      expect(curve.slope(xi)).toBeCloseTo(slope[i] ?? NaN, 11);
    });
  });
});
