import {
  criticalBand,
  isProminent,
  prominenceBands,
  prominenceCriterionDb,
  prominenceRatioDb,
  proximityHz,
  TONE_RANGE_HZ,
  toneToNoiseCriterionDb,
  toneToNoiseDb,
} from "@/lib/science/acoustics/ecma-tones";
import { encounters } from "@/lib/science/acoustics/encounters";
import { firstExtremumOfJ } from "@/lib/science/acoustics/bessel";
import {
  bladePassingHz,
  cutOnHz,
  interactionModeOrder,
  predictTones,
  strutModeOrders,
} from "@/lib/science/acoustics/fan-tones";
import { weightingDb } from "@/lib/science/acoustics/weighting";
import type { Handlers, Inputs } from "./handler";

const power = (levelDb: number) => 10 ** (levelDb / 10);
const lg = (value: number) => 10 * Math.log10(value);

function ratio(i: Inputs) {
  const toneHz = i.n("ft_Hz");
  const ratioDb = toneToNoiseDb({
    toneHz,
    tonePower: power(i.n("Lt_dB")),
    bandPower: power(i.n("Ltot_dB")),
    summedHz: i.n("dftot_Hz"),
  });
  return {
    dfc_Hz: criticalBand(toneHz).widthHz,
    Ln_dB: i.n("Lt_dB") - ratioDb,
    TNR_dB: ratioDb,
    criterion_dB: toneToNoiseCriterionDb(toneHz),
    prominent: isProminent(toneHz, ratioDb, undefined),
  };
}

function ratioInWhite(i: Inputs) {
  const toneHz = i.n("ft_Hz");
  const { widthHz } = criticalBand(toneHz);
  const noise = power(i.n("N0_dB_per_Hz")) * widthHz;
  const tonePower = power(i.n("Lt_dB"));
  const ratioDb = toneToNoiseDb({ toneHz, tonePower, bandPower: tonePower + noise, summedHz: widthHz });
  return {
    TNR_dB: ratioDb,
    criterion_dB: toneToNoiseCriterionDb(toneHz),
    prominent: isProminent(toneHz, ratioDb, undefined),
  };
}

function prominence(toneHz: number, middle: number, lower: number, upper: number) {
  const prominenceDb = prominenceRatioDb({ toneHz, middlePower: middle, lowerPower: lower, upperPower: upper });
  const bands = prominenceBands(toneHz);
  return {
    LM_dB: lg(middle),
    LL_dB: lg(lower),
    LU_dB: lg(upper),
    PR_dB: prominenceDb,
    dfL_Hz: bands.middleFromHz - bands.lowerFromHz,
    criterion_dB: prominenceCriterionDb(toneHz),
    prominent: isProminent(toneHz, undefined, prominenceDb),
  };
}

function prominenceInWhite(i: Inputs) {
  const toneHz = i.n("ft_Hz");
  const { lowerFromHz, middleFromHz, middleToHz, upperToHz } = prominenceBands(toneHz);
  const density = power(i.n("N0_dB_per_Hz"));
  return prominence(
    toneHz,
    power(i.n("Lt_dB")) + density * (middleToHz - middleFromHz),
    density * (middleFromHz - lowerFromHz),
    density * (upperToHz - middleToHz),
  );
}

export const toneHandlers: Handlers = {
  criticalBand: (i) => {
    const { widthHz, lowerHz, upperHz } = criticalBand(i.n("ft_Hz"));
    return { dfc_Hz: widthHz, f1_Hz: lowerHz, f2_Hz: upperHz };
  },
  prBands: (i) => {
    const { lowerFromHz, middleFromHz, middleToHz, upperToHz } = prominenceBands(i.n("ft_Hz"));
    return {
      f1L_Hz: lowerFromHz,
      f1M_Hz: middleFromHz,
      f2M_Hz: middleToHz,
      f2U_Hz: upperToHz,
      dfL_Hz: middleFromHz - lowerFromHz,
      dfU_Hz: upperToHz - middleToHz,
    };
  },
  prominenceCriteria: (i) => ({
    TNR_dB: toneToNoiseCriterionDb(i.n("ft_Hz")),
    PR_dB: prominenceCriterionDb(i.n("ft_Hz")),
  }),
  proximitySpacing: (i) => i.list("ft_Hz").map(proximityHz),
  toneToNoise: ratio,
  tnrToneInWhite: ratioInWhite,
  prominenceRatio: (i) => prominence(i.n("ft_Hz"), power(i.n("LM_dB")), power(i.n("LL_dB")), power(i.n("LU_dB"))),
  prToneInWhite: prominenceInWhite,
  bpf: (i) => {
    const first = bladePassingHz(i.n("blades"), i.n("rpm"));
    return {
      f_Hz: Array.from({ length: i.n("harmonics") }, (_, m) => bladePassingHz(i.n("blades"), i.n("rpm"), m + 1)),
      shaft_Hz: i.n("rpm") / 60,
      A_weight_at_BPF_dB: weightingDb("A", first),
      inEcmaRange: first >= TONE_RANGE_HZ.from && first < TONE_RANGE_HZ.to,
    };
  },
  interactionTone: (i) => {
    const [m1, m2] = [i.n("m1"), i.n("m2")];
    const blades = [i.n("B1"), i.n("B2")] as const;
    const rotation = i.get("counterRotating") === true ? "counter" : "co";
    // Orders beyond those that are listed are checked on the formula alone.
    const listed = predictTones({ blades, rpm: [i.n("rpm1"), i.n("rpm2")], rotation }).find(
      (tone) => tone.m1 === m1 && tone.m2 === m2,
    );
    const f = Math.abs(m1 * bladePassingHz(blades[0], i.n("rpm1")) + m2 * bladePassingHz(blades[1], i.n("rpm2")));
    return {
      f_Hz: listed?.frequencyHz ?? f,
      modeOrder: listed?.modeOrder ?? interactionModeOrder(blades, m1, m2, rotation),
    };
  },
  minModeOrder: (i) => i.list("m").map((m) => Math.abs(strutModeOrders(i.n("blades"), i.n("struts"), m)[0] ?? NaN)),
  encounters: (i) => {
    const result = encounters([i.n("B1"), i.n("B2")], [i.n("rpm1"), i.n("rpm2")]);
    const step = result.instantsPerRelativeRev;
    return {
      gcd_simultaneousPairs: result.pairsAtOnce,
      lcm_instantsPerRelativeRev: step,
      encountersPerRelativeRev: result.encountersPerRelativeRev,
      relativeRevPerRotor1Rev: result.relativeRevPerRotor1Rev,
      instantsPerRotor1Rev: result.instantsPerRotor1Rev,
      instantRate_Hz: result.instantRateHz,
      lowestPlaneMode_Hz:
        (step / i.n("B1")) * bladePassingHz(i.n("B1"), i.n("rpm1")) +
        (step / i.n("B2")) * bladePassingHz(i.n("B2"), i.n("rpm2")),
    };
  },
  cutOn: (i) => ({
    jprime: firstExtremumOfJ(i.n("nu")),
    f_c_Hz: cutOnHz(i.n("nu"), i.n("a_m"), i.n("c_m_s")),
  }),
};
