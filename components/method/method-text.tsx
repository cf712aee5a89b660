import { Section } from "@/components/ui/sheet";
import { CautionList } from "@/components/ui/notice";
import { Formula, type FormulaProps } from "./formula";

const sound: readonly FormulaProps[] = [
  {
    name: "Mean of levels",
    formula: "L = 10 lg[(1/n) Σ 10^(Lᵢ/10)]",
    source: "Energy mean: ISO 3744:2010, Eq. (12).",
  },
  {
    name: "Background taken out",
    formula: "L = L′ − K₁, K₁ = −10 lg(1 − 10^(−ΔL/10)), ΔL = L′ − L_background",
    children:
      "Engineering grade: no correction above 15 dB, a correction from 6 to 15 dB; below 6 dB K₁ is held at its value at 6 dB and the level is an upper bound, written ≤. Survey grade: the same with 10 and 3 dB.",
    source: "ISO 3744:2010, 8.2.3 (engineering); ISO 3746:2010, 8.3.3 (survey).",
  },
  {
    name: "A-weighting",
    formula: "closed form with the unrounded normalisation",
    source: "IEC 61672-1:2013, Annex E.",
  },
];

const heat: readonly FormulaProps[] = [
  {
    name: "Temperature rise",
    formula: "ΔT = T_sensor − T_ambient, sample by sample",
    source: "Definition; a slow drift of the ambient cancels so.",
  },
  {
    name: "Steady state",
    formula: "residual = τ × slope",
    children:
      "A run counts once what is left to rise or fall is within the protocol’s limit; what the gate leaves enters the budget as a rectangular half-width.",
    source: "House rule, derived for this bench; the half-width: JCGM 100:2008, 4.3.7.",
  },
  { name: "Thermal resistance", formula: "R = ΔT / P, K/W", source: "Definition." },
];

const sure: readonly FormulaProps[] = [
  {
    name: "Combined standard uncertainty",
    formula: "u² = Σ (cᵢ uᵢ)²",
    children:
      "Type A from repeats and remounts, type B from certificates, resolution and checks. A part that a design and its baseline share acts on their difference only, so the offset of the meter cancels and its gain nearly does.",
    source: "JCGM 100:2008, 5.1.2 and F.1.2.3.",
  },
  {
    name: "Effective degrees of freedom",
    formula: "ν = u⁴ / Σ [(cᵢ uᵢ)⁴ / νᵢ]",
    source: "Welch–Satterthwaite: JCGM 100:2008, G.4.1.",
  },
  {
    name: "Interval on the pages",
    formula: "value ± U, U = k·u at 95 % coverage, k from Student’s t at ν",
    source: "JCGM 100:2008, 6.3 and G.6.4. k is not 2 by habit.",
  },
];

const compared: readonly FormulaProps[] = [
  {
    name: "Equal noise",
    formula: "ratio(L) = (ΔT/P)(L) ÷ (ΔT/P of the session’s baseline)(L)",
    children:
      "Both curves run through the measured points and keep their monotony. They are read within the range of both and never beyond it. ΔT against the baseline in K is (ratio − 1) × the baseline’s ΔT at that level. Where the baseline’s curve rests on a bound, the level counts as not reached.",
    source:
      "Interpolant: F. N. Fritsch and R. E. Carlson, SIAM J. Numer. Anal. 17 (1980) 238; slopes: F. N. Fritsch and J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300. Reading at equal level: house rule.",
  },
  {
    name: "Score",
    formula: "mean over the season’s declared levels of ratio(L); lower is better",
    children:
      "Who doesn’t reach every declared level, or whose baseline doesn’t, is listed as not ranked, with the reason. A season may choose another rule; rules are versions and freeze at the first reading.",
    source: "House rule, no source.",
  },
  {
    name: "Rank range",
    formula: "2.5 % to 97.5 % of the rank over seeded simulated rounds",
    children:
      "All entries of a session share the draw of its baseline in each simulated round. Ties that the data can’t separate are called so: pairs by t, adjusted over all pairs.",
    source: "Adjustment: S. Holm, Scand. J. Stat. 6 (1979) 65. Simulation: in the manner of JCGM 101:2008.",
  },
];

const cautions = [
  "A printed rotor can burst or shed a blade: guard, eye protection, stand out of its plane, raise the speed in steps, stop on vibration.",
  "The heat load and the cooler are hot enough to burn skin.",
  "A stopped or jammed fan lets the heater overheat: fit an independent thermal cut-out and never leave it unattended.",
  "From 80 dB(A) at the ear mind your hearing; near 85 dB(A) and above wear protection and limit the time.",
  "Mains wiring is licensed work: follow local codes.",
];

function Formulas({ items }: { items: readonly FormulaProps[] }) {
  return (
    <div className="grid gap-5">
      {items.map((each) => (
        <Formula key={each.name} {...each} />
      ))}
    </div>
  );
}

/** How it is measured, corrected, compared and scored, with sources, limits and cautions. */
export function MethodText() {
  return (
    <>
      <Section id="measured" title="How it is measured">
        <div className="grid gap-3">
          <p>
            One printed copy stands on one fixed air-cooler bench. A heater of constant power warms the cooler; the fan
            runs at set speeds. A microphone fixed on the bench, on the inlet side and out of the jet, hears it; its
            distance counts from the inlet-side mounting flange, 100 mm unless the bench says otherwise (common
            practice, no source). A level is therefore written “dB(A) @ 100 mm”: it holds at that place on that bench.
          </p>
          <p>
            A session begins and ends with the calibrator, the background (fan stopped, everything else running, heater
            off) and the baseline, a reference fan by unit and serial. In between every design is mounted several times
            and run at every set speed. A session whose calibrator or baseline is out is held until another person lifts
            the hold.
          </p>
        </div>
      </Section>
      <Section id="sound" title="Sound">
        <Formulas items={sound} />
      </Section>
      <Section id="heat" title="Heat">
        <Formulas items={heat} />
      </Section>
      <Section id="uncertainty" title="How sure">
        <Formulas items={sure} />
      </Section>
      <Section id="compared" title="Compared and scored">
        <Formulas items={compared} />
      </Section>
      <Section id="limits" title="What it does not say">
        <ul className="grid max-w-3xl list-[square] gap-2 pl-5">
          <li>
            It conforms to no standard for sound power: one microphone near the fan, in no qualified room. Formulas are
            taken from standards where named; the whole is a house method.
          </li>
          <li>One copy is measured as a rule: copy-to-copy spread of prints is not included, and the sheet says so.</li>
          <li>
            Absolute levels and temperatures compare only within one bench version, protocol and baseline. Elsewhere
            stand a level difference in dB and the ratio of ΔT/P to each session’s own baseline, and across baseline
            units only through a bridge.
          </li>
          <li>
            An inlet stack of a fifth or more of the microphone’s distance may read high on axis (house rule, no
            source). The sheet shows the off-axis reading beside it where the bench has one, and never corrects for it.
          </li>
          <li>A level says nothing of how a fan sounds: tones are another matter.</li>
        </ul>
      </Section>
      <Section id="cautions" title="Cautions">
        <CautionList title="what can hurt" items={cautions} />
      </Section>
    </>
  );
}
