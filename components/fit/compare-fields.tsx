import { Fold } from "@/components/ui/fold";
import { NumberField } from "@/components/ui/number-field";
import { Select } from "@/components/ui/field";
import { Slot } from "@/components/ui/slot";
import { ownFrameSpans, type OwnFrame } from "@/lib/client/fit/chosen-frame";
import type { FitFrame, FitLimits } from "@/lib/contracts/fit-limits";

/** What a model is compared with. */
export type CompareWith = {
  frameKey: string;
  /** Numbers of the frame at hand, in place of the preset's. */
  ownFrame: OwnFrame;
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
  const preset = limits.frames.find((frame) => frame.key === chosen.frameKey);
  return (
    <div className="grid max-w-4xl items-start gap-4 sm:grid-cols-2 lg:grid-cols-4">
      <Select
        label="Frame"
        value={chosen.frameKey}
        onChange={(event) => onChange({ frameKey: event.target.value, ownFrame: {} })}
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
      {preset ? (
        <OwnFrameFields
          key={preset.key}
          preset={preset}
          own={chosen.ownFrame}
          onChange={(ownFrame) => onChange({ ownFrame })}
        />
      ) : null}
    </div>
  );
}

/** A preset is common practice; the frame at hand may measure otherwise. */
function OwnFrameFields({
  preset,
  own,
  onChange,
}: {
  preset: FitFrame;
  own: OwnFrame;
  onChange: (own: OwnFrame) => void;
}) {
  const spans = ownFrameSpans(preset);
  return (
    <div className="sm:col-span-2 lg:col-span-4">
      <Fold title="Measured the frame at hand? Its own numbers">
        <div className="grid items-start gap-4 sm:grid-cols-3">
          {(["boreMm", "depthMm", "toleranceMm"] as const).map((name) => (
            <NumberField
              key={name}
              label={spans[name].label}
              unit="mm"
              min={spans[name].min}
              max={spans[name].max}
              defaultValue={own[name] ?? preset[name]}
              hint={`preset ${preset[name]}`}
              onValue={(value) => onChange({ ...own, [name]: value })}
            />
          ))}
        </div>
      </Fold>
    </div>
  );
}
