import { Facts, type Fact } from "@/components/ui/facts";
import { Missing } from "@/components/ui/missing";
import { CautionList } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import type { RotorTraits } from "@/lib/client/fit/messages";
import { OVERSPEED, stressWords, turningFigures, type TurningFigures } from "@/lib/client/fit/turning";
import { formatNumber } from "@/lib/format/numbers";
import { MaterialsTable } from "./materials-table";

const openMesh = "the mesh isn’t closed, so no mass is known";
const noSection = "the mesh doesn’t tell";

/** A correction below this is rounding of the mesh. */
const NOTHING_G = 0.002;

const told = (value: number | null, unit: string, decimals: number, why: string) =>
  value === null ? <Missing why={why} /> : `${formatNumber(value, { decimals })} ${unit}`;

function facts(turning: TurningFigures): Fact[] {
  const { correctionMassG, correctionAngleDeg } = turning;
  return [
    { label: "Mass, solid", value: told(turning.massG, "g", 1, openMesh) },
    { label: "Tip speed", value: told(turning.tipSpeedMs, "m/s", 1, noSection) },
    { label: "Static unbalance as drawn", value: told(turning.staticGmm, "g·mm", 2, openMesh) },
    { label: "Couple unbalance as drawn", value: told(turning.coupleGmm2, "g·mm²", 1, openMesh) },
    { label: "Force of it", value: told(turning.forceN, "N", 3, openMesh) },
    { label: "Grade, indicative", value: turning.grade ?? <Missing why={openMesh} /> },
    { label: "G 6.3 permits", value: told(turning.permittedGmm, "g·mm", 2, openMesh) },
    {
      label: "Correction at the hub’s edge",
      value:
        correctionMassG === null || correctionAngleDeg === null || correctionMassG < NOTHING_G ? (
          <Missing why={turning.massG === null ? openMesh : "nothing is off as drawn"} />
        ) : (
          `${formatNumber(correctionMassG, { decimals: 3 })} g at ${formatNumber(correctionAngleDeg)}°`
        ),
    },
    { label: "Hoop stress", value: told(turning.hoopMpa, "MPa", 3, noSection) },
    { label: "Pull at the blade root", value: told(turning.rootMpa, "MPa", 3, noSection) },
    { label: `Hoop stress at ${OVERSPEED} × speed`, value: told(turning.hoopOverMpa, "MPa", 3, noSection) },
    { label: `Root at ${OVERSPEED} × speed`, value: told(turning.rootOverMpa, "MPa", 3, noSection) },
  ];
}

export type BalanceSectionProps = {
  rotors: readonly RotorTraits[];
  densityGCm3: number | undefined;
  speedRpm: number | undefined;
};

/** Balance and stress of the design as drawn, with what they leave out: cautions, never a verdict. */
export function BalanceSection({ rotors, densityGCm3, speedRpm }: BalanceSectionProps) {
  if (rotors.length === 0) return null;
  const known = densityGCm3 !== undefined && densityGCm3 > 0 && speedRpm !== undefined && speedRpm > 0;
  return (
    <Section
      id="balance"
      title="Balance and burst"
      note={known ? `at ${formatNumber(speedRpm)} r/min and ${formatNumber(densityGCm3, { decimals: 2 })} g/cm³` : null}
      className="grid gap-5"
    >
      <CautionList title="before it turns" items={stressWords.cautions} />
      {known ? (
        rotors.map((rotor, index) => (
          <div key={index} className="grid gap-2">
            {rotors.length > 1 ? <h3>Rotor {index + 1}</h3> : null}
            <Facts flow="strip" facts={facts(turningFigures(rotor, densityGCm3, speedRpm))} />
          </div>
        ))
      ) : (
        <p>Give a speed and a density above, and the figures stand here.</p>
      )}
      <div className="grid max-w-3xl gap-2">
        <h3>What these figures assume</h3>
        <ul className="list-[square] space-y-1 pl-5">
          {stressWords.assumptions.map((assumption) => (
            <li key={assumption}>{assumption}</li>
          ))}
          <li>Balance is of the drawing; a print differs by infill, seams and stray blobs.</li>
          <li>The grade borrows ISO 21940-11, which wasn’t written for plastic rotors of some ten grams.</li>
        </ul>
      </div>
      <MaterialsTable />
    </Section>
  );
}
