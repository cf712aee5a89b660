import { Fold } from "@/components/ui/fold";
import type { SpecimenView } from "@/lib/contracts/bench-prints";
import { PartForm } from "./part-form";

export type CopyPartsProps = {
  specimen: SpecimenView;
  name: string;
  topSpeedRpm: number | null;
  open: boolean;
  writable: boolean;
};

const settingsOf = (copy: SpecimenView): string =>
  [
    copy.material,
    copy.colour,
    copy.layerHeightMm && `${copy.layerHeightMm} mm layers`,
    copy.nozzleMm && `${copy.nozzleMm} mm nozzle`,
    copy.infillPercent !== null && `${copy.infillPercent} % infill`,
    copy.walls && `${copy.walls} walls`,
    copy.layersAcrossAxis && "layers across the axis",
    copy.note,
  ]
    .filter(Boolean)
    .join(", ");

/** One printed copy: its settings, and mass, balance and spin-up of each rotor. */
export function CopyParts({ specimen, name, topSpeedRpm, open, writable }: CopyPartsProps) {
  const states = specimen.parts.map((part) => `rotor ${part.rotorPosition} ${part.state.replace("_", " ")}`);
  return (
    <Fold title={`Copy ${specimen.number}: ${states.join(", ") || "no rotor recorded"}`} open={open}>
      <p className="mb-3">{settingsOf(specimen)}</p>
      <div className="grid gap-5">
        {specimen.parts.map((part) =>
          writable && (part.state === "printed" || part.state === "passed") ? (
            <PartForm
              key={part.rotorPosition}
              specimenId={specimen.id}
              part={part}
              topSpeedRpm={topSpeedRpm}
              name={`${name}, copy ${specimen.number}, rotor ${part.rotorPosition}`}
            />
          ) : (
            <p key={part.rotorPosition}>
              Rotor {part.rotorPosition}, {part.state.replace("_", " ")}
              {part.massG === null ? "" : `: ${part.massG} g`}
              {part.balanceRecord ? `; balance: ${part.balanceRecord}` : ""}
              {part.spinUpSpeedRpm === null ? "" : `; ${part.spinUpSpeedRpm} rpm: ${part.spinUpRecord}`}
            </p>
          ),
        )}
      </div>
    </Fold>
  );
}
