import { describe, expect, it } from "vitest";
import * as balance from "@/lib/science/mechanics/balance";
import * as burst from "@/lib/science/mechanics/burst";
import { expectClose, idsOf, num, nums, vector, type Vector } from "../support/vectors";

/** Balance: ISO 21940-11:2016 formulas and published examples; the source of each stands in its title. */
function balanceOf(id: string, v: Vector): unknown {
  const n = (key: string) => num(v.inputs[key]);
  if (id === "T6-01") return { value: balance.permissibleUnbalanceGmm(1, 1, 1) };
  if (id === "T6-08") {
    const [massG, unbalance, rpm] = [1000 * n("mass_kg"), n("U_gmm"), n("n_rpm")];
    return {
      e_um: (1000 * unbalance) / massG,
      e_omega_mm_s: balance.unbalanceVelocityMmS(unbalance, massG, rpm),
      grade_band: balance.indicativeGrade(unbalance, massG, rpm),
    };
  }
  if (id === "T6-09") {
    const found = balance.rotorUnbalance(n("mass_g"), [n("com_offset_mm"), 0, 0], 0, 0);
    return {
      U_gmm: found.staticGmm,
      e_omega_mm_s: balance.unbalanceVelocityMmS(found.staticGmm, n("mass_g"), n("n_rpm")),
      F_N: balance.unbalanceForceN(found.staticGmm, n("n_rpm")),
      correction_mass_g: balance.staticCorrection(found, n("correction_radius_mm"))?.massG,
    };
  }
  if (id === "T6-10") {
    const extra = { massG: n("extra_mass_g"), radiusMm: n("radius_mm"), angleRad: 1, heightMm: 0 };
    const rest = { massG: n("rotor_mass_g") - extra.massG, radiusMm: 0, angleRad: 0, heightMm: 0 };
    const found = balance.pointMassUnbalance([extra, rest]);
    return {
      U_gmm: found.staticGmm,
      e_mm: found.eccentricityMm,
      e_omega_mm_s: balance.unbalanceVelocityMmS(found.staticGmm, n("rotor_mass_g"), n("n_rpm")),
    };
  }
  if (id === "T6-11") {
    const [radii, angles, heights] = [nums(v.inputs["r_mm"]), nums(v.inputs["theta_deg"]), nums(v.inputs["z_mm"])];
    const masses = nums(v.inputs["masses_g"]).map((massG, k) => ({
      massG,
      radiusMm: radii[k] ?? NaN,
      angleRad: ((angles[k] ?? NaN) * Math.PI) / 180,
      heightMm: heights[k] ?? NaN,
    }));
    const found = balance.pointMassUnbalance(masses);
    return {
      static_U_gmm: found.staticGmm,
      Ixz_gmm2: found.xzGmm2,
      Iyz_gmm2: found.yzGmm2,
      couple_gmm2: found.coupleGmm2,
      per_bearing_gmm: found.coupleGmm2 / n("bearing_span_mm"),
    };
  }
  const permissible = balance.permissibleUnbalanceGmm(n("G_mm_s"), n("mass_kg"), n("n_rpm"));
  return {
    Uper_gmm: permissible,
    eper_um: permissible / n("mass_kg"),
    unbalance_force_at_limit_N: balance.unbalanceForceN(permissible, n("n_rpm")),
  };
}

/** Burst: Timoshenko, Roark, Shigley; the source of each stands in its title. */
function burstOf(id: string, v: Vector): unknown {
  const n = (key: string) => num(v.inputs[key]);
  switch (id) {
    case "T7-01":
    case "T7-02":
    case "T7-03":
      return { v_m_s: burst.tipSpeedMs(n("d_m"), n("n_rpm")) };
    case "T7-06":
    case "T7-07":
    case "T7-08":
      return {
        v_m_s: burst.tipSpeedMs(2 * n("r_m"), n("n_rpm")),
        sigma_MPa: burst.thinRingHoopMpa(n("rho_kg_m3"), n("r_m"), n("n_rpm")),
      };
    case "T7-09": {
      const solid = burst.solidDiscMpa(n("rho"), n("R_m"), n("n_rpm"), n("nu"));
      const disc = burst.annulusStress(n("rho"), n("R_m"), n("r0_m"), n("n_rpm"), n("nu"));
      const pinhole = burst.annulusStress(n("rho"), n("R_m"), 0, n("n_rpm"), n("nu"));
      return {
        solid_center_MPa: solid,
        annulus_hoop_MPa: disc.hoopMpa,
        annulus_radial_MPa: disc.radialMpa,
        small_hole_limit_ratio_to_solid: pinhole.hoopMpa / solid,
      };
    }
    case "T7-10": {
      // ρ = γ/g in lbf s²/in⁴ and lengths in inches give psi; the functions divide by 10⁶ for MPa.
      const rho = n("gamma_lbf_in3") / n("g_in_s2");
      const found = burst.annulusStress(rho, n("ro_in"), n("ri_in"), n("n_rpm"), n("nu"));
      return { hoop_max_psi: found.hoopMpa * 1e6, radial_max_psi: found.radialMpa * 1e6 };
    }
    case "T7-16":
      return {
        sigma_MPa: burst.ringBladeLoadMpa(n("B"), n("blade_mass_kg"), n("r_cg_m"), n("ring_area_m2"), n("n_rpm")),
      };
    case "T7-17": {
      const found = burst.stressRatio(n("sigma_MPa"), n("strength_MPa"), n("interlayer_fraction"), n("n_rpm"));
      return { SF_stress: found.onStress, SF_speed: found.onSpeed, nominal_burst_rpm: found.nominalSpeedRpm };
    }
    case "T7-18":
      return {
        v_m_s: burst.tipSpeedMs(2 * n("r_m"), n("n_rpm")),
        E_J: burst.bladeEnergyJ(n("mass_kg"), n("r_m"), n("n_rpm")),
      };
    case "T7-19":
      return { stress_ratio: nums(v.inputs["overspeed"]).map(burst.overspeedStressRatio) };
    default:
      return {
        sigma_MPa: burst.bladeRootMpa(n("rho"), n("rh_m"), n("rt_m"), n("n_rpm"), n("area_ratio_tip_to_root")),
      };
  }
}

describe.each([
  ["T6-", balanceOf],
  ["T7-", burstOf],
] as const)("figures of section %s agree with their sources", (section, compute) => {
  it.each(idsOf(section).map((id) => [vector(id).title, id]))("%s", (_, id) => {
    const v = vector(id);
    expectClose(compute(id, v), v.expected, v.tolerance);
  });
});

describe("a correction", () => {
  it("stands opposite the heavy side", () => {
    const heavy = balance.rotorUnbalance(50, [0.1, 0.1, 3], 0, 0);
    expect(balance.staticCorrection(heavy, 50)?.angleRad).toBeCloseTo((5 * Math.PI) / 4, 12);
  });

  it("is none where nothing is off", () => {
    expect(balance.staticCorrection(balance.rotorUnbalance(50, [0, 0, 3], 0, 0), 50)).toBeUndefined();
  });
});
