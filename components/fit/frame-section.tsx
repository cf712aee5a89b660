import { Facts } from "@/components/ui/facts";
import { Missing } from "@/components/ui/missing";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import type { FitFrame, FitSeason } from "@/lib/contracts/fit-limits";
import { compareWithFrame } from "@/lib/client/fit/frame-comparison";
import type { ModelMeasured } from "@/lib/client/fit/messages";
import { formatNumber } from "@/lib/format/numbers";

const mm = (value: number) => `${formatNumber(value, { decimals: 2 })} mm`;

export type FrameSectionProps = { measured: ModelMeasured; frame: FitFrame; season: FitSeason | undefined };

/** The model against a frame and a season's limits: fits or not, by how much, and what to change. */
export function FrameSection({ measured, frame, season }: FrameSectionProps) {
  const { fit, tipGapMm, depthMm, seasonReasons } = compareWithFrame(measured, frame, season);
  const reasons = [...(fit?.reasons ?? []), ...seasonReasons];
  const noRotor = <Missing why="no rotor was found in the file" />;
  const against = `the frame ${frame.key}${season ? ` and ${season.title}` : ""}`;
  return (
    <Section id="frame" title="Frame and season" note={`against ${against}`} className="grid gap-4">
      {reasons.length > 0 ? (
        <Notice kind="wrong" title={`it doesn’t fit ${against}`}>
          <ul className="mt-1 list-[square] space-y-1 pl-5">
            {reasons.map((reason) => (
              <li key={reason}>{reason}</li>
            ))}
          </ul>
        </Notice>
      ) : fit ? (
        <p className="text-lg font-bold">It fits {against}.</p>
      ) : (
        <p>Without a rotor there is no tip gap to judge.</p>
      )}
      <Facts
        flow="strip"
        facts={[
          { label: "Tip gap, nominal", value: tipGapMm === undefined ? noRotor : mm(tipGapMm) },
          { label: "Smallest clearance after tolerance", value: fit ? mm(fit.smallestClearanceMm) : noRotor },
          { label: "Bore of the frame", value: mm(frame.boreMm) },
          { label: "Tolerance", value: `${mm(frame.toleranceMm)} a side` },
          { label: "Depth in all", value: mm(depthMm) },
          ...(season?.totalDepthMaxMm ? [{ label: "Depth allowed", value: mm(season.totalDepthMaxMm) }] : []),
          ...(season && season.inletStackMaxMm !== null
            ? [{ label: "Inlet stack allowed", value: mm(season.inletStackMaxMm) }]
            : []),
        ]}
      />
      <p className="small-print max-w-3xl">
        Rotors are taken as centred in the frame’s bore and depth. Frame presets are common practice without a standard
        behind them; measure yours. A tip gap under 0.5 mm is small for a printed rotor: runout and warmth use it up.
      </p>
    </Section>
  );
}
