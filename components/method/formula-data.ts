/** A formula of the method: what it gives, how far it holds, and where it comes from. */
export type MethodFormula = {
  /** What it gives, in words. */
  name: string;
  /** Written out, one line. */
  formula: string;
  /** What it computes, and what follows. */
  text?: string;
  /** Where it holds. */
  range: string;
  /** Edition and clause, or that it is a house rule. */
  source: string;
};

export const methodFormulas = {
  energyMean: {
    name: "Mean of levels",
    formula: "L = 10 lg[(1/n) Σ 10^(Lᵢ/10)]",
    range: "Any levels, one or more; of digital silence nothing is said.",
    source: "Energy mean: ISO 3744:2010, Eq. (12).",
  },
  background: {
    name: "Background taken out",
    formula: "L = L′ − K₁, K₁ = −10 lg(1 − 10^(−ΔL/10)), ΔL = L′ − L_background",
    text: "Engineering grade: no correction above 15 dB, a correction from 6 to 15 dB; below 6 dB K₁ is held at its value at 6 dB and the level is an upper bound, written ≤. Survey grade: the same with 10 and 3 dB.",
    range: "ΔL above 6 dB (engineering) or 3 dB (survey); nearer it is a bound.",
    source: "ISO 3744:2010, 8.2.3 (engineering); ISO 3746:2010, 8.3.3 (survey).",
  },
  weighting: {
    name: "A- and C-weighting",
    formula: "closed form with the unrounded normalisation at 1 kHz",
    range: "10 Hz to 20 kHz.",
    source: "IEC 61672-1:2013, Annex E.",
  },
  thirdOctaves: {
    name: "Third-octave bands",
    formula: "f_m = 1000 · 10^(n/10) Hz, edges f_m · 10^(±1/20)",
    range: "25 Hz to 16 kHz, by their exact mid-band frequencies.",
    source: "IEC 61260-1:2014, 5.2 to 5.5.",
  },
  calibration: {
    name: "Calibrated level of a recording",
    formula: "L = L_calibrator + 20 lg(p_rms / p_rms,calibrator)",
    range: "Recordings of 1 s or more that are not clipped; under 10 s with a warning.",
    source: "Definition of the sound pressure level; calibrator: IEC 60942.",
  },
  tones: {
    name: "Prominent tones",
    formula: "tone-to-noise ratio and prominence ratio against the critical band",
    text: "Prominent by either criterion; below 89.1 Hz nothing is said.",
    range: "89.1 Hz to 11.2 kHz.",
    source: "ECMA-418-1, 2nd edition.",
  },
  predictedTones: {
    name: "Predicted tones",
    formula: "m·B·n for blade passing; m₁B₁n₁ + m₂B₂n₂ between rotors",
    range: "Orders up to 8; between rotors |m₁| + |m₂| up to 6. Within max(1 line, 0.5 % of f).",
    source: "J. M. Tyler and T. G. Sofrin, SAE Trans. 70 (1962) 309.",
  },
  loudness: {
    name: "Loudness",
    formula: "N from third-octave levels, stationary method",
    text: "As read at the microphone, free field: no statement on a room.",
    range: "Stationary sounds of 28 third-octave levels.",
    source: "ISO 532-1:2017, with the published results of Annex B.",
  },
  resistance: {
    name: "Temperature rise and thermal resistance",
    formula: "ΔT = T_sensor − T_ambient, sample by sample; R = ΔT / P, K/W",
    range: "ΔT above 0 with the heat on.",
    source: "Definition; a slow drift of the ambient cancels so.",
  },
  steadyState: {
    name: "Steady state",
    formula: "residual = τ × slope, with |slope| + 2 s(slope) within the limit",
    text: "A run counts once what is left to rise or fall is within the protocol’s limit; the variance-ratio statistic and an exponential fit stand beside it. What the gate leaves enters the budget as a rectangular half-width.",
    range: "First-order settling; in a quantised or autocorrelated record slope and fit alone, and it says so.",
    source:
      "House rule, derived for this bench; half-width: JCGM 100:2008, 4.3.7; statistic: S. Cao and R. R. Rhinehart, J. Process Control 5 (1995) 363.",
  },
  airDensity: {
    name: "Air density",
    formula: "ρ = p M / (Z R T) · [1 − x_v (1 − M_v/M)]",
    text: "Stands beside a figure; no figure is corrected by it.",
    range: "600 to 1100 hPa, 15 to 27 °C.",
    source: "CIPM-2007: A. Picard et al., Metrologia 45 (2008) 149.",
  },
  combined: {
    name: "Combined standard uncertainty",
    formula: "u² = Σ (cᵢ uᵢ)²",
    text: "Type A from repeats and remounts, type B from certificates, resolution and checks. A part that a design and its baseline share acts on their difference only, so the offset of the meter cancels and its gain nearly does.",
    range: "Independent parts; shared ones are inputs of their own.",
    source: "JCGM 100:2008, 5.1.2 and F.1.2.3.",
  },
  degreesOfFreedom: {
    name: "Effective degrees of freedom and interval",
    formula: "ν = u⁴ / Σ [(cᵢ uᵢ)⁴ / νᵢ]; value ± U, U = t₀.₉₇₅(ν) · u",
    text: "95 % coverage, k from Student’s t at ν, rounded down: k is not 2 by habit.",
    range: "Uncorrelated parts.",
    source: "Welch–Satterthwaite: JCGM 100:2008, G.4.1 (eq. G.2b), 6.3 and G.6.4.",
  },
  againstBaseline: {
    name: "Against the baseline of the session",
    formula: "D = L − L_base; r = (ΔT/P) ÷ (ΔT/P)_base",
    range: "Two subjects of one session; across baseline units only over a bridge.",
    source: "JCGM 100:2008, 5.2.2 with F.1.2.3.",
  },
  controlCharts: {
    name: "Control charts of the baseline",
    formula: "x̄ ± 3 MR̄/d₂; z = λx + (1 − λ)z, λ = 0.2; trial: x̄ ± t·s·√(1 + 1/n)",
    text: "Level and ΔT/P at each set speed and the calibrator, a point a session. Until twenty sessions of a phase limits are trial; then they are frozen. A session that is out is held: it is not signed until another person lifts the hold or a change is documented.",
    range: "From the third session of a phase on.",
    source:
      "NIST/SEMATECH e-Handbook, 6.3.2.2 and 6.3.2.4; width of the weighted mean: J. M. Lucas and M. S. Saccucci, Technometrics 32 (1990) 1; run rules: L. S. Nelson, J. Qual. Technol. 16 (1984) 237. Twenty: common practice, no source.",
  },
  equalNoise: {
    name: "Equal noise",
    formula: "ratio(L) = (ΔT/P)(L) ÷ (ΔT/P of the session’s baseline)(L)",
    text: "Both curves run through the measured points and keep their monotony. ΔT against the baseline in K is (ratio − 1) × the baseline’s ΔT at that level. Where the baseline’s curve rests on a bound, the level counts as not reached.",
    range: "Within the range of both curves, never beyond it.",
    source:
      "Interpolant: F. N. Fritsch and R. E. Carlson, SIAM J. Numer. Anal. 17 (1980) 238; slopes: F. N. Fritsch and J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300. Reading at equal level: house rule.",
  },
  score: {
    name: "Score",
    formula: "mean over the season’s declared levels of ratio(L); lower is better",
    text: "Who doesn’t reach every declared level, or whose baseline doesn’t, is listed as not ranked, with the reason. A session with another baseline unit goes over a bridge, with its uncertainty added, or is not ranked. A season may choose another rule; rules are versions and freeze at the first reading.",
    range: "Entries that reach every declared level.",
    source: "House rule, no source.",
  },
  rankRange: {
    name: "Rank range",
    formula: "2.5 % to 97.5 % of the rank over seeded simulated rounds",
    text: "All entries of a session share the draw of its baseline in each simulated round.",
    range: "Normal parts with the sizes of the budget.",
    source: "Simulation: in the manner of JCGM 101:2008.",
  },
  letters: {
    name: "Letters",
    formula: "pairs by t at their degrees of freedom, adjusted over all pairs, at 0.05",
    text: "Entries that share a letter can’t be told apart by the data. Sharing is not transitive: a, ab, b.",
    range: "Up to two hundred groups; beyond, no letters are given.",
    source:
      "Adjustment: S. Holm, Scand. J. Stat. 6 (1979) 65. Display: H.-P. Piepho, J. Comput. Graph. Stat. 13 (2004) 456.",
  },
} as const satisfies Record<string, MethodFormula>;

export type FormulaKey = keyof typeof methodFormulas;
