import { SpectrumChart } from "@/components/charts/spectrum-chart";
import { chartBands, markedTones } from "@/components/charts/spectrum-marks";
import { TonesTable } from "@/components/tables/tones-table";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Fold } from "@/components/ui/fold";
import type { SetSpeedSpectrum, Snapshot } from "@/lib/contracts/publication";
import { formatNumber } from "@/lib/format/numbers";
import { bandUnit, levelUnit } from "@/lib/format/quantities";
import { prominentSentence } from "@/lib/format/tones";

/** Spectra as publishing would freeze them, with the ids that a signature covers; absent where none stands. */
export function SpectraList({ snapshot }: { snapshot: Snapshot }) {
  const { spectra, microphoneDistanceMm: distance } = snapshot;
  if (!spectra) return null;
  const stages = spectra.makers.entry?.blades.length ?? 1;
  const baselineOf = ({ setSpeed, position }: SetSpeedSpectrum) =>
    spectra.baseline.find((each) => each.setSpeed === setSpeed && each.position === position);
  const point = ({ setSpeed }: SetSpeedSpectrum) => snapshot.points.find((each) => each.setSpeed === setSpeed);
  return (
    <div className="grid gap-3">
      <BarsTable
        caption="Spectra by set speed, as read"
        showCaption
        phone="fold"
        columns={[
          { key: "what", head: "Set speed and position" },
          { key: "heard", head: "Level of the spectra", unit: levelUnit(distance) },
          { key: "read", head: "Level read", unit: levelUnit(distance) },
          { key: "sone", head: "Loudness at the microphone", unit: "sone" },
          { key: "tones", head: "Tones" },
          { key: "ids", head: "Signed with the round" },
        ]}
        rows={spectra.entry.map((each) => ({
          key: `${each.setSpeed} ${each.position}`,
          cells: {
            what: { words: `${formatNumber(each.setSpeed)}, ${each.position}` },
            heard: { figure: { value: each.levelADba, decimals: 1 } },
            read: { figure: { value: each.ofProtocol ? point(each)?.levelReadDba : null, decimals: 1 } },
            sone: { figure: { value: each.loudness?.sone, decimals: 1, why: "a band is missing" } },
            tones: { words: prominentSentence(each.tones, stages) },
            ids: {
              words: (
                <span className="figures break-all">{[...each.spectrumIds, ...each.backgroundIds].join(", ")}</span>
              ),
            },
          },
        }))}
      />
      {spectra.entry.map((each) => {
        const baseline = baselineOf(each);
        const title = `${formatNumber(each.setSpeed)}, ${each.position}: bands and tones`;
        return (
          <Fold key={title} title={title}>
            <SpectrumChart
              bands={chartBands(each.bands)}
              tones={markedTones(each.tones, stages)}
              baseline={baseline && { key: "baseline", name: "baseline", bands: chartBands(baseline.bands) }}
              unit={bandUnit(distance)}
            />
            {each.tones.length > 0 ? (
              <TonesTable
                tones={each.tones}
                stages={stages}
                unit={bandUnit(distance)}
                caption={`Tones found, ${title}`}
              />
            ) : null}
          </Fold>
        );
      })}
    </div>
  );
}
