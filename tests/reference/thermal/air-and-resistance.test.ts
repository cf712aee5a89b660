import { describe, expect, it } from "vitest";
import {
  airDensityCipm,
  airDensityOiml,
  airDensitySimplified,
  standardAtmosphere,
} from "@/lib/science/thermal/air-density";
import {
  airSideRise,
  deltaTAtDensity,
  differenceAtReference,
  resistanceRatio,
  thermalConductance,
  thermalResistance,
} from "@/lib/science/thermal/resistance";
import { expectClose, idsOf, num, record, vector, type Vector } from "../support/vectors";

const n = (v: Vector, key: string) => num(v.inputs[key]);
const air = (v: Vector) => ({
  temperatureC: n(v, "t_C"),
  pressurePa: n(v, "p_Pa"),
  humidityRel: n(v, "rh_fraction"),
});

function compute(v: Vector): unknown {
  if (v.title.includes("CIPM-2007 (")) {
    const found = airDensityCipm({ ...air(v), co2Fraction: n(v, "xCO2") });
    return {
      psv_Pa: found.saturationPa,
      enhancement_f: found.enhancement,
      xv: found.vapourFraction,
      Z: found.compressibility,
      rho_kg_m3: found.densityKgM3,
    };
  }
  if (v.title.includes("OIML")) return { rho_kg_m3: airDensityOiml(n(v, "t_C"), n(v, "p_hPa"), n(v, "rh_percent")) };
  if (v.title.includes("simplified")) return { rho_kg_m3: airDensitySimplified(air(v)) };
  if (v.title.includes("standard atmosphere")) {
    const found = standardAtmosphere(n(v, "H_geopotential_m"));
    return { T_K: found?.temperatureK, p_Pa: found?.pressurePa, rho_kg_m3: found?.densityKgM3 };
  }
  if (v.title.includes("heat balance"))
    return { dT_air_K: airSideRise(n(v, "P_W"), n(v, "rho_kg_m3"), n(v, "Q_m3_s"), n(v, "cp_J_kgK")) };
  if (v.title.includes("thermal resistance"))
    return {
      R_K_per_W: thermalResistance(n(v, "dT_K"), n(v, "P_W")),
      G_W_per_K: thermalConductance(n(v, "dT_K"), n(v, "P_W")),
    };
  if (v.title.includes("density scaling")) {
    const scaled = (deltaTK: number) => deltaTAtDensity(deltaTK, n(v, "rho_ref"), n(v, "rho"), n(v, "m"));
    return { dT_K: scaled(n(v, "dT_ref_K")), factor: scaled(1) };
  }
  if (v.title.includes("unequal power")) {
    const reading = (key: string) => {
      const side = record(v.inputs[key]);
      return { deltaTK: num(side.dT_K), powerW: num(side.P_W) };
    };
    const r = resistanceRatio(reading("design"), reading("baseline")) ?? Number.NaN;
    return { r, diff_at_reference_dT_40K: differenceAtReference(r, 40) };
  }
  const session = record(v.inputs.session1);
  const [baseline, design, factor] = [session.baseline_dT, session.design_dT, v.inputs.session2_density_factor].map(
    num,
  );
  if (baseline === undefined || design === undefined || factor === undefined) throw new Error("incomplete");
  const ratioOf = (scale: number) =>
    resistanceRatio({ deltaTK: design * scale, powerW: 1 }, { deltaTK: baseline * scale, powerW: 1 }) ?? Number.NaN;
  return {
    diff_session1: differenceAtReference(ratioOf(1), baseline),
    ratio_session1: ratioOf(1),
    diff_session2: differenceAtReference(ratioOf(factor), baseline * factor),
    ratio_session2: ratioOf(factor),
    diff_renormalised_session2: differenceAtReference(ratioOf(factor), num(v.inputs.reference_baseline_dT)),
  };
}

describe("air and thermal resistance", () => {
  it.each(idsOf("T1-").map(vector))("$title", (v) => {
    // The density of the standard atmosphere's check values rests on R = 287.05287 to 1e-7, as their tolerance says.
    expectClose(compute(v), v.expected, v.tolerance);
  });
  it("says nothing for a rise or a power that can't be", () => {
    expect(thermalResistance(-0.1, 100)).toBeUndefined();
    expect(thermalConductance(20, 0)).toBeUndefined();
    expect(airSideRise(100, 1.2, 0)).toBeUndefined();
    expect(standardAtmosphere(12_000)).toBeUndefined();
  });
});
