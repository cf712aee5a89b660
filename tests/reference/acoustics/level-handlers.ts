import { octave, overallFromBands, thirdOctave } from "@/lib/science/acoustics/bands";
import { calibrate, calibrationDrift, pressurePa } from "@/lib/science/acoustics/calibration";
import {
  backgroundCorrection,
  energyMean,
  energySubtract,
  energySum,
  type BackgroundGrade,
} from "@/lib/science/acoustics/levels";
import { digitalAWeighting, responseDb } from "@/lib/science/acoustics/a-filter";
import { weightingDb } from "@/lib/science/acoustics/weighting";
import { WEIGHTING_TABLE } from "@/lib/science/acoustics/weighting-table";
import {
  decayRateDbPerS,
  equivalentLevelDb,
  exposureLevelDb,
  onePoleCoefficient,
  stepResponseDb,
  TIME_CONSTANT_S,
  toneBurstDb,
  toneBurstExposureDb,
} from "@/lib/science/acoustics/time-weighting";
import { nums, rows } from "../support/vectors";
import type { Handlers, Inputs } from "./handler";

const GRADES: Record<string, BackgroundGrade> = {
  eng3744: "engineering",
  survey3746: "survey",
  precision3745: "precision",
};

function bandHandler(band: ReturnType<typeof thirdOctave>) {
  return { nominal_Hz: band.nominalHz, f_m_Hz: band.midHz, f_lower_Hz: band.lowerHz, f_upper_Hz: band.upperHz };
}

function fromBands(inputs: Inputs) {
  const levels = inputs.list("band_dB");
  const bands = inputs.list("f_nominal_Hz").map((nominalHz, i) => {
    const index = Array.from({ length: 40 }, (_, k) => k - 20).find((x) => thirdOctave(x).nominalHz === nominalHz);
    return { index: index ?? NaN, levelDb: levels[i] ?? NaN };
  });
  return {
    LZ_dB: overallFromBands(bands, "Z"),
    LC_dB_nominal: overallFromBands(bands, "C", "printed"),
    LA_dB_nominal: overallFromBands(bands, "A", "printed"),
    LA_dB_exact: overallFromBands(bands, "A"),
  };
}

function twoTone(inputs: Inputs) {
  const tones = rows(inputs.get("tones"));
  const total = (weighting: "A" | "C" | "Z") =>
    energySum(tones.map(([frequencyHz = NaN, levelDb = NaN]) => levelDb + weightingDb(weighting, frequencyHz)));
  return { LZ_dB: total("Z"), LA_dB: total("A"), LC_dB: total("C") };
}

function bilinear(inputs: Inputs) {
  const rate = inputs.n("fs_Hz");
  const filter = digitalAWeighting(rate);
  const deviation = inputs.list("f_nominal_Hz").map((nominalHz) => {
    const exactHz = 10 ** (Math.round(10 * Math.log10(nominalHz)) / 10);
    return responseDb(filter, exactHz, rate) - weightingDb("A", exactHz);
  });
  return { deviation_dB: deviation };
}

const limits = (of: (row: (typeof WEIGHTING_TABLE)[number]) => number | undefined) =>
  WEIGHTING_TABLE.map((row) => of(row) ?? null);

export const levelHandlers: Handlers = {
  energySum: (i) => energySum(i.list("levels_dB")),
  energyMean: (i) => energyMean(i.list("levels_dB"), i.get("weights") === null ? undefined : nums(i.get("weights"))),
  energySubtract: (i) => energySubtract(i.n("total_dB"), i.n("part_dB")),
  backgroundCorrection: (i) => {
    const grade = GRADES[i.text("grade")];
    if (grade === undefined) throw new Error("unknown grade");
    const frequencyHz = i.optional("f_Hz");
    const result = backgroundCorrection({
      measuredDb: i.n("measured_dB"),
      backgroundDb: i.n("background_dB"),
      grade,
      ...(frequencyHz === undefined ? {} : { frequencyHz }),
    });
    return { K1_dB: result.k1Db, corrected_dB: result.correctedDb, upperBound: result.upperBound };
  },
  weighting: (i) => ({
    A_dB: weightingDb("A", i.n("f_Hz")),
    C_dB: weightingDb("C", i.n("f_Hz")),
    Z_dB: weightingDb("Z", i.n("f_Hz")),
  }),
  weightingTable: (i) => ({
    A_dB: i.list("f_exact_Hz").map((f) => weightingDb("A", f)),
    C_dB: i.list("f_exact_Hz").map((f) => weightingDb("C", f)),
  }),
  weightingTable3: () => ({
    A_dB: limits((row) => row.aDb),
    C_dB: limits((row) => row.cDb),
    class1_upper: limits((row) => row.class1.upperDb),
    class1_lower: limits((row) => row.class1.lowerDb),
    class2_upper: limits((row) => row.class2.upperDb),
    class2_lower: limits((row) => row.class2.lowerDb),
  }),
  bilinearDeviation: bilinear,
  thirdOctave: (i) => bandHandler(thirdOctave(i.n("x"))),
  octave: (i) => bandHandler(octave(i.n("x"))),
  bandEdgeRatio: () => ({
    upper: thirdOctave(0).upperHz / thirdOctave(0).midHz,
    lower: thirdOctave(0).lowerHz / thirdOctave(0).midHz,
  }),
  aWeightedFromBands: fromBands,
  paFromLevel: (i) => pressurePa(i.n("L_dB")),
  calibrate: (i) => {
    const result = calibrate(i.n("x_rms_FS"), i.n("L_cal_dB"));
    return { Pa_per_FS: result.paPerFullScale, offset_dB: result.offsetDb, L_of_sine_FS_dB: result.fullScaleSineDb };
  },
  calibrationDrift: (i) => {
    const result = calibrationDrift(i.n("before_dB"), i.n("after_dB"));
    return { drift_dB: result.driftDb, valid: result.withinLimit };
  },
  twoTone,
  toneburst: (i) => {
    const delta = toneBurstDb(i.n("Tb_ms") / 1000, i.text("weighting") === "F" ? "F" : "S");
    return { delta_ref_dB: delta, table4_dB: Math.round(delta * 10) / 10 };
  },
  toneburstExposure: (i) => toneBurstExposureDb(i.n("Tb_ms") / 1000),
  decayRate: () => ({ F_dB_per_s: decayRateDbPerS("F"), S_dB_per_s: decayRateDbPerS("S") }),
  stepResponse: (i) => i.list("t_s").map((t) => stepResponseDb(t, i.n("tau_s"))),
  onePole: (i) => ({
    F: onePoleCoefficient(i.n("fs_Hz"), TIME_CONSTANT_S.F),
    S: onePoleCoefficient(i.n("fs_Hz"), TIME_CONSTANT_S.S),
  }),
  leqFromShortLeq: (i) => equivalentLevelDb(i.list("levels_dB")),
  sel: (i) => exposureLevelDb(i.n("Leq_dB"), i.n("T_s")),
};
