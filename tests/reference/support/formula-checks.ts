import type { FormulaKey } from "@/components/method/formula-data";

/** Which reference tests stand behind a formula: a file under tests/reference, and what their titles hold. */
type Where = { readonly file: string; readonly title?: RegExp };

const acoustics = (title: RegExp): Where => ({ file: "acoustics/vectors", title });

export const FORMULA_CHECKS: Readonly<Record<FormulaKey, readonly Where[]>> = {
  energyMean: [
    acoustics(/\bL-(sum|mean|sub)/),
    { file: "statistics/logistics", title: /T12-09/ },
    { file: "results/set-speed-points", title: /energies/ },
    { file: "results/session-points", title: /energy mean/ },
  ],
  background: [
    acoustics(/\bK1-/),
    { file: "statistics/logistics", title: /T12-0[234]/ },
    { file: "results/session-points", title: /background/ },
    { file: "results/set-speed-points", title: /background|bound|correction/ },
  ],
  weighting: [acoustics(/ > W-/)],
  thirdOctaves: [acoustics(/ > B-/)],
  calibration: [acoustics(/ > C-/)],
  tones: [acoustics(/ > (CB|PB|CR|TNR|PR|FC)-/)],
  predictedTones: [acoustics(/ > (BPF|INT|TS|ENC)-/)],
  loudness: [acoustics(/ > (SP|PS|ZW)-|Annex B\.3/)],
  resistance: [{ file: "thermal/air-and-resistance", title: /T1-2[1-7]|can't be/ }],
  steadyState: [{ file: "thermal/steady-state" }],
  airDensity: [{ file: "thermal/air-and-resistance", title: /T1-(0\d|1[0-9]|20)/ }],
  combined: [{ file: "statistics/uncertainty", title: /T3-0[1-9]/ }, acoustics(/ > U-/), { file: "results/budget" }],
  degreesOfFreedom: [
    { file: "statistics/uncertainty", title: /T3-(10|19|20)|truncates/ },
    { file: "statistics/stated" },
    { file: "results/set-speed-points", title: /degrees of freedom/ },
  ],
  againstBaseline: [
    { file: "statistics/uncertainty", title: /T3-1[12]/ },
    { file: "results/against-baseline" },
    { file: "thermal/air-and-resistance", title: /T1-3[23]/ },
  ],
  controlCharts: [{ file: "statistics/control-charts" }, { file: "baselines/control-point" }],
  equalNoise: [{ file: "results/equal-noise" }, { file: "statistics/pchip" }, acoustics(/ > PC-/)],
  score: [{ file: "scoring/round-by-numpy" }, { file: "scoring/point-rules" }],
  rankRange: [
    { file: "statistics/ranking", title: /T11-(0[789]|1[1-5])/ },
    { file: "scoring/ranks-and-letters", title: /chances|bound|wins/ },
  ],
  letters: [
    { file: "statistics/ranking", title: /T11-1[67]|T10-1[89]/ },
    { file: "scoring/ranks-and-letters", title: /pairs|Welch|shared|cancel/ },
  ],
};
