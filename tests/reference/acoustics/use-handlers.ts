import {
  dipoleExcessDb,
  discOverPointDb,
  inverseSquareDb,
  nearFieldFrequencyHz,
  pistonDirectivityDb,
  placementErrorDb,
  speedOfSoundMS,
} from "@/lib/science/acoustics/distance";
import {
  fanSoundLawDb,
  fitSpeedExponent,
  flowPressureDb,
  speedChangeDb,
  speedRatioForReduction,
} from "@/lib/science/acoustics/fan-laws";
import {
  dailyExposureDba,
  exposureActions,
  nioshDose,
  nioshMinutes,
  peakPressureDb,
} from "@/lib/science/acoustics/hearing";
import { energyMean } from "@/lib/science/acoustics/levels";
import { stationaryLoudness } from "@/lib/science/acoustics/loudness";
import { phonFromSone, soneFromPhon } from "@/lib/science/acoustics/sone";
import { studentTQuantile, studentTTwoSided } from "@/lib/science/statistics/distributions";
import { pchip } from "@/lib/science/statistics/pchip";
import { combineIndependent, typeA, typeBHalfWidth, welchSatterthwaite } from "@/lib/science/statistics/uncertainty";
import { nums, record, rows } from "../support/vectors";
import type { Handlers, Inputs } from "./handler";

const parts = (value: unknown) => rows(value).map(([minutes = NaN, levelDba = NaN]) => ({ minutes, levelDba }));
const points = (x: readonly number[], y: readonly number[]) => x.map((at, i) => ({ x: at, y: y[i] ?? NaN }));
const curve = (i: Inputs) => pchip(points(i.list("x"), i.list("y")));

function difference(i: Inputs) {
  const a = typeA(i.list("a_dB"));
  const b = typeA(i.list("b_dB"));
  if (a === undefined || b === undefined) throw new Error("no readings");
  const se = combineIndependent([a.u, b.u]);
  const dof = welchSatterthwaite([
    { u: a.u, dof: a.dof },
    { u: b.u, dof: b.dof },
  ]);
  const diff = Math.abs(b.mean - a.mean);
  const critical = studentTQuantile(0.975, dof);
  return {
    diff_dB: diff,
    se_dB: se,
    dof,
    t: diff / se,
    p_two_sided: studentTTwoSided(diff / se, dof),
    t_crit_95: critical,
    half_width_95_dB: critical * se,
  };
}

function compare(i: Inputs) {
  const of = (name: string) => {
    const side = record(i.get(name));
    return pchip(points(nums(side.dBA), nums(side.dT)));
  };
  const [baseline, candidate] = [of("baseline"), of("candidate")];
  return {
    commonRange_dBA: [Math.max(baseline.xMin, candidate.xMin), Math.min(baseline.xMax, candidate.xMax)],
    deltaT_difference_K: i.list("q_dBA").map((q) => (candidate.value(q) ?? NaN) - (baseline.value(q) ?? NaN)),
  };
}

export const useHandlers: Handlers = {
  inverseSquare: (i) => inverseSquareDb(i.n("r1_m"), i.n("r2_m")),
  placementError: (i) => {
    const { closerDb, fartherDb } = placementErrorDb(i.n("r_mm"), i.n("error_mm"));
    return { closer_dB: closerDb, farther_dB: fartherDb };
  },
  speedOfSound: (i) => i.list("theta_C").map(speedOfSoundMS),
  nearFieldRadius: (i) => {
    const lambda = i.n("c_m_s") / i.n("f_Hz");
    // Where 100 mm is the near-field radius is nearFieldFrequencyHz; kr at 100 mm is the frequency over that one.
    const kr = i.n("f_Hz") / nearFieldFrequencyHz(0.1, i.n("c_m_s"));
    return { lambda_m: lambda, lambda_over_2pi_m: 0.1 / kr, kr_at_100mm: kr };
  },
  nearFieldFrequency: (i) => nearFieldFrequencyHz(i.n("r_m"), i.n("c_m_s")),
  discVsPoint: (i) => discOverPointDb(i.n("a_m"), i.n("r_m")),
  dipoleNearFieldExcess: (i) => dipoleExcessDb(i.n("f_Hz"), i.n("r_m"), i.n("c_m_s")),
  pistonDirectivity: (i) => ({
    ka: i.n("a_m") / (i.n("c_m_s") / (2 * Math.PI * i.n("f_Hz"))),
    rel_to_axis_dB: pistonDirectivityDb(i.n("f_Hz"), i.n("a_m"), i.n("theta_deg"), i.n("c_m_s")),
  }),
  phonToSone: (i) => soneFromPhon(i.n("phon")),
  soneToPhon: (i) => phonFromSone(i.n("sone")),
  zwickerStationary: (i) => {
    const field = i.text("field") === "diffuse" ? "diffuse" : "free";
    const { sone, phon } = stationaryLoudness(i.list("bands_25Hz_12k5_dB"), field);
    return { N_sone: sone, LN_phon: phon };
  },
  speedChange: (i) => speedChangeDb(i.n("rpm1"), i.n("rpm2"), i.n("exponent")),
  fanSoundLaw: (i) =>
    fanSoundLawDb({ speed: i.n("n_ratio"), diameter: i.n("D2_mm") / i.n("D1_mm"), airDensity: i.n("rho_ratio") }),
  flowPressureForm: (i) => ({
    from_QdP_dB: flowPressureDb(i.n("n_ratio"), i.n("n_ratio") ** 2),
    from_50lg_dB: speedChangeDb(1, i.n("n_ratio")),
  }),
  speedForReduction: (i) => speedRatioForReduction(i.n("reduction_dB"), i.n("exponent")),
  fitSpeedExponent: (i) => {
    const fit = fitSpeedExponent(i.list("rpm").map((rpm, k) => ({ rpm, levelDb: i.list("LA_dB")[k] ?? NaN })));
    return {
      exponent_dB_per_decade: fit.exponentDbPerDecade,
      intercept_dB: fit.interceptDb,
      R2: fit.rSquared,
      L_at_1350_dB: fit.interceptDb + fit.exponentDbPerDecade * Math.log10(1350),
    };
  },
  nioshTime: (i) => ({ minutes: nioshMinutes(i.n("LA_dB")) }),
  nioshDose: (i) => {
    const { dosePercent, averageDba } = nioshDose(parts(i.get("minutes_level")));
    return { dose_percent: dosePercent, TWA_dBA: averageDba };
  },
  lex8h: (i) => {
    const daily = dailyExposureDba([{ minutes: i.n("hours") * 60, levelDba: i.n("LAeq_dB") }]) ?? NaN;
    return { LEX8h_dB: daily, ...exposureActions(daily) };
  },
  peakPaToDb: (i) => i.list("p_Pa").map(peakPressureDb),
  lex8hTasks: (i) => dailyExposureDba(parts(i.get("tasks"))),
  expandedUncertainty: (i) => {
    const total = combineIndependent([i.n("sigma_R0_dB"), i.n("sigma_omc_dB")]);
    return { sigma_tot_dB: total, U_dB: i.n("k") * total };
  },
  operatingSd: (i) => {
    const result = typeA(i.list("levels_dB"));
    const mean = energyMean(i.list("levels_dB"));
    return { sigma_omc_dB: result?.s, mean_dB: result?.mean, energyMean_dB: mean, sem_dB: result?.u };
  },
  combine: (i) => {
    const u = combineIndependent(i.list("u_dB"));
    return { u_c_dB: u, U95_dB: 2 * u };
  },
  rectToStd: (i) => i.list("a_dB").map((a) => typeBHalfWidth(a, "rectangular")),
  welchDifference: difference,
  pchip: (i) => i.list("q").map((q) => curve(i).value(q) ?? null),
  pchipSlopes: (i) => i.list("x").map((x) => curve(i).slope(x)),
  pchipInverse: (i) => i.list("target").map((y) => curve(i).inverse(y)),
  compareAtEqualLevel: compare,
};
