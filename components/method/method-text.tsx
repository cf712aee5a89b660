import { Section } from "@/components/ui/sheet";
import { CautionList } from "@/components/ui/notice";
import { distanceErrorWords } from "@/lib/format/microphone";
import { Formula } from "./formula";
import type { FormulaKey } from "./formula-data";
import { PropertiesTried } from "./properties-tried";
import counts from "./reference-checks.json";

const sound: readonly FormulaKey[] = [
  "calibration",
  "weighting",
  "thirdOctaves",
  "energyMean",
  "background",
  "tones",
  "predictedTones",
  "loudness",
];
const heat: readonly FormulaKey[] = ["resistance", "steadyState", "airDensity"];
const sure: readonly FormulaKey[] = ["combined", "degreesOfFreedom", "againstBaseline", "controlCharts"];
const compared: readonly FormulaKey[] = ["equalNoise", "score", "rankRange", "letters"];

const cautions = [
  "A printed rotor can burst or shed a blade: guard, eye protection, stand out of its plane, raise the speed in steps, stop on vibration.",
  "The heat load and the cooler are hot enough to burn skin.",
  "A stopped or jammed fan lets the heater overheat: fit an independent thermal cut-out and never leave it unattended.",
  "From 80 dB(A) at the ear mind your hearing; near 85 dB(A) and above wear protection and limit the time.",
  "Mains wiring is licensed work: follow local codes.",
];

function Formulas({ of }: { of: readonly FormulaKey[] }) {
  return (
    <div className="grid gap-5">
      {of.map((key) => (
        <Formula key={key} of={key} />
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
          <p>
            A season opens on a bench that ten remounts of its baseline have qualified. Behind each formula below stands
            the number of reference checks that every test run holds it to: published values, worked examples of
            standards, other programs, closed forms; {counts.total} in all. The numbers are counted from the tests, not
            typed.
          </p>
        </div>
      </Section>
      <Section id="sound" title="Sound">
        <Formulas of={sound} />
      </Section>
      <Section id="heat" title="Heat">
        <Formulas of={heat} />
      </Section>
      <Section id="uncertainty" title="How sure">
        <Formulas of={sure} />
      </Section>
      <Section id="compared" title="Compared and scored">
        <Formulas of={compared} />
      </Section>
      <PropertiesTried />
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
          <li>
            A microphone 5 mm too far from 100 mm would read {distanceErrorWords(100, 105)} in a free field: the jig
            fixes it, and what is left is shared by a design and its baseline.
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
