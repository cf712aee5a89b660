import { describe, expect, it } from "vitest";
import {
  dutyPointQuadratic,
  dutyPoints,
  levelChangeDb,
  scaleFan,
  twoFansQuadratic,
} from "@/lib/science/mechanics/fan-laws";
import { expectClose, idsOf, num, nums, vector, type Vector } from "../support/vectors";

const n = (v: Vector, key: string) => num(v.inputs[key]);
const optional = (v: Vector, key: string) => (v.inputs[key] === undefined ? 1 : n(v, key));

function compute(v: Vector): unknown {
  switch (v.id) {
    case "T5-01": {
      const density = (n(v, "T0") + n(v, "t1_C")) / (n(v, "T0") + n(v, "t2_C"));
      const point = { flow: n(v, "Q_m3_s"), pressure: n(v, "p_Pa"), shaftPower: n(v, "P_kW") };
      const scaled = scaleFan(point, { density });
      return { Q_m3_s: scaled.flow, p_Pa: scaled.pressure, P_kW: scaled.shaftPower };
    }
    case "T5-06": {
      const point = { flow: 1, pressure: n(v, "p_meas"), shaftPower: n(v, "P_meas") };
      const scaled = scaleFan(point, { density: n(v, "rho_ref") / n(v, "rho") });
      // 0.075 lbm/ft³ with the exact pound and foot.
      const amca = (0.075 * 0.45359237) / 0.3048 ** 3;
      return { p_ref: scaled.pressure, P_ref: scaled.shaftPower, amca_standard_density_kg_m3: amca };
    }
    case "T5-10": {
      const curve = [
        { flow: 0, pressure: n(v, "p0") },
        { flow: n(v, "Qm"), pressure: 0 },
      ];
      const [point] = dutyPoints(curve, n(v, "k"));
      return { Q: point?.flow, p: point?.pressure };
    }
    case "T5-11": {
      const curve = nums(v.inputs.Q).map((flow, i) => ({ flow, pressure: nums(v.inputs.p)[i] ?? NaN }));
      const found = dutyPoints(curve, n(v, "k"));
      expect(found).toHaveLength(1);
      return { Q: found[0]?.flow, p: found[0]?.pressure };
    }
    case "T5-12": {
      const both = twoFansQuadratic(n(v, "p0"), n(v, "Qm"), n(v, "k"));
      const single = dutyPointQuadratic(n(v, "p0"), n(v, "Qm"), n(v, "k"));
      return { single_Q: single.flow, series_Q: both.series.flow, parallel_Q: both.parallel.flow };
    }
    case "T5-13":
    case "T5-14":
      return { dL_dB: levelChangeDb({ speed: n(v, "n_ratio") }).totalDb };
    case "T5-15": {
      const change = levelChangeDb({ diameter: n(v, "d_ratio"), density: n(v, "rho_ratio") });
      return { size_dB: change.sizeDb, density_dB: change.densityDb };
    }
  }
  if (v.inputs.p0 !== undefined) {
    const point = dutyPointQuadratic(n(v, "p0"), n(v, "Qm"), n(v, "k"));
    return { Q: point.flow, p: point.pressure };
  }
  const scaled = scaleFan(
    { flow: n(v, "Q"), pressure: n(v, "p"), shaftPower: n(v, "P") },
    {
      speed: n(v, "n2") / n(v, "n1"),
      diameter: optional(v, "d2") / optional(v, "d1"),
      density: optional(v, "r2") / optional(v, "r1"),
    },
  );
  return { Q: scaled.flow, p: scaled.pressure, P: scaled.shaftPower };
}

describe("fan laws and duty points", () => {
  it.each(idsOf("T5-").map(vector))("$title", (v) => expectClose(compute(v), v.expected, v.tolerance));

  it("finds all three crossings of a curve with a dip and calls the middle one unstable (derived by hand)", () => {
    // The system passes below the dip, over it and below the last peak: three changes of sign, one a piece.
    const curve = [
      { flow: 0, pressure: 20 },
      { flow: 3, pressure: 4 },
      { flow: 6, pressure: 26 },
      { flow: 10, pressure: 6 },
    ];
    const found = dutyPoints(curve, 0.6);
    expect(found.map(({ stable }) => stable)).toEqual([true, false, true]);
    for (const { flow, pressure } of found) expect(pressure).toBeCloseTo(0.6 * flow * flow, 9);
  });
  it("gives none where the curves don't meet, and refuses flows that don't rise", () => {
    expect(
      dutyPoints(
        [
          { flow: 1, pressure: 1 },
          { flow: 2, pressure: 0.5 },
        ],
        5,
      ),
    ).toEqual([]);
    expect(() =>
      dutyPoints(
        [
          { flow: 2, pressure: 1 },
          { flow: 1, pressure: 2 },
        ],
        1,
      ),
    ).toThrow(RangeError);
  });
});
