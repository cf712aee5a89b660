import { NumberField } from "@/components/ui/number-field";
import { Select } from "@/components/ui/field";
import { Slot } from "@/components/ui/slot";
import type { FitLimits } from "@/lib/contracts/fit-limits";

/** What a model is compared with. */
export type CompareWith = {
  frameKey: string;
  seasonSlug: string;
  speedRpm: number | undefined;
  densityGCm3: number | undefined;
  /** The file's axis points at the cooler. */
  turned: boolean;
};

export type CompareFieldsProps = {
  limits: FitLimits;
  chosen: CompareWith;
  onChange: (part: Partial<CompareWith>) => void;
};

/** Frame, season, speed and density: set before or after the model, they hold at once. */
export function CompareFields({ limits, chosen, onChange }: CompareFieldsProps) {
  return (
    <div className="grid max-w-4xl items-start gap-4 sm:grid-cols-2 lg:grid-cols-4">
      <Select
        label="Frame"
        value={chosen.frameKey}
        onChange={(event) => onChange({ frameKey: event.target.value })}
        options={limits.frames.map((frame) => ({
          value: frame.key,
          label: `${frame.sizeMm} × ${frame.depthMm} mm, bore ${frame.boreMm}`,
        }))}
      />
      <Select
        label="Season"
        value={chosen.seasonSlug}
        onChange={(event) => onChange({ seasonSlug: event.target.value })}
        options={[
          ...limits.seasons.map((season) => ({ value: season.slug, label: season.title })),
          { value: "", label: "none" },
        ]}
      />
      <NumberField
        label="Speed"
        unit="r/min"
        min={1}
        max={30_000}
        defaultValue={chosen.speedRpm}
        onValue={(speedRpm) => onChange({ speedRpm })}
      />
      <NumberField
        label="Density"
        unit="g/cm³"
        min={0.1}
        max={25}
        defaultValue={chosen.densityGCm3}
        onValue={(densityGCm3) => onChange({ densityGCm3 })}
      />
      <div className="sm:col-span-2 lg:col-span-4">
        <Slot
          label="The file’s axis points at the cooler, not away from it"
          checked={chosen.turned}
          onChange={(event) => onChange({ turned: event.target.checked })}
        />
      </div>
    </div>
  );
}
