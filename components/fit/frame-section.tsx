import { Facts } from "@/components/ui/facts";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import { LoadingState } from "@/components/ui/states";
import type { FitFrame, FitSeason } from "@/lib/contracts/fit-limits";
import type { Comparison } from "@/lib/client/fit/compare-model";
import { formatFrame } from "@/lib/format/frames";
import { formatNumber } from "@/lib/format/numbers";
import { KeepOutTable } from "./keep-out-table";

const mm = (value: number) => `${formatNumber(value, { decimals: 2 })} mm`;

export type FrameSectionProps = {
  compared: { readonly comparison: Comparison | undefined } | undefined;
  frame: FitFrame;
  /** Some of its numbers are not the preset's. */
  own: boolean;
  season: FitSeason | undefined;
};

function Verdict({ reasons, against }: { reasons: readonly string[]; against: string }) {
  if (reasons.length === 0) return <p className="text-lg font-bold">It fits {against}.</p>;
  return (
    <Notice kind="wrong" title={`it doesn’t fit ${against}`}>
      <ul className="mt-1 list-[square] space-y-1 pl-5">
        {reasons.map((reason) => (
          <li key={reason}>{reason}</li>
        ))}
      </ul>
    </Notice>
  );
}

/** The model against a frame, a season's limits and what stands around the cooler: fits or not, and what to change. */
export function FrameSection({ compared, frame, own, season }: FrameSectionProps) {
  const named = `the frame ${formatFrame(frame.key)}${own ? ", as you measured it," : ""}`;
  const against = season ? `${named} and ${season.title}` : named.replace(/,$/, "");
  const comparison = compared?.comparison;
  return (
    <Section id="frame" title="Frame, season and bench" note={`against ${against}`} className="grid gap-4">
      {compared ? null : <LoadingState label="Comparing" rows={4} />}
      {compared && !comparison ? <p>Without a rotor there is no tip gap to judge and nothing that turns.</p> : null}
      {comparison ? (
        <>
          <Verdict
            against={against}
            reasons={[
              ...comparison.limits.reasons,
              ...comparison.keepOuts.flatMap(({ meets, name, change }) =>
                meets ? `${name}: ${change ?? "in the way"}.` : [],
              ),
            ]}
          />
          <Facts
            flow="strip"
            facts={[
              { label: "Tip gap, nominal", value: mm(comparison.limits.tipGapMm) },
              { label: "Smallest clearance in the frame", value: mm(comparison.limits.smallestClearanceMm) },
              { label: "Bore of the frame", value: mm(frame.boreMm) },
              { label: "Tolerance, taken off", value: `${mm(frame.toleranceMm)} a side` },
              { label: "Depth in all", value: mm(comparison.limits.depthMm) },
              { label: "Past the frame, inlet side", value: mm(comparison.limits.inletMm) },
              ...(season?.totalDepthMaxMm ? [{ label: "Depth allowed", value: mm(season.totalDepthMaxMm) }] : []),
              ...(season && season.inletStackMaxMm !== null
                ? [{ label: "Inlet stack allowed", value: mm(season.inletStackMaxMm) }]
                : []),
            ]}
          />
          {season && comparison.keepOuts.length + comparison.notCompared.length > 0 ? (
            <KeepOutTable comparison={comparison} season={season} />
          ) : null}
        </>
      ) : null}
      <p className="small-print max-w-3xl">
        Each rotor is taken as centred in a frame of its own, the first frame on the cooler’s mounting face. Frame
        presets are common practice without a standard behind them; measure yours. A tip gap under 0.5 mm is small for a
        printed rotor: runout and warmth use it up.
      </p>
    </Section>
  );
}
