import { SpectrumChart } from "@/components/charts/spectrum-chart";
import { chartBands, markedTones } from "@/components/charts/spectrum-marks";
import { spectrumSummary } from "@/components/charts/spectrum-model";
import { TonesTable } from "@/components/tables/tones-table";
import { ChoiceLinks } from "@/components/ui/choice-links";
import { Facts, type Fact } from "@/components/ui/facts";
import { Fold } from "@/components/ui/fold";
import { Missing } from "@/components/ui/missing";
import { Section } from "@/components/ui/sheet";
import type { Sheet } from "@/lib/contracts/sheet";
import type { SheetSpectrum } from "@/lib/contracts/sheet-spectra";
import { formatNumber } from "@/lib/format/numbers";
import { bandUnit, formatLevel } from "@/lib/format/quantities";
import { prominentSentence } from "@/lib/format/tones";
import { countWords } from "@/lib/format/words";
import { millimetres, stackReadsHigh } from "./sheet-words";
import { PredictionsTable } from "./predictions-table";
import { chosenSpectrum } from "./spectrum-words";

/** What the address asks of the spectrum: a set speed, a microphone position. */
export type SpectrumAsked = { speed?: number; position?: string };

const loudnessWords = (loudness: SheetSpectrum["loudness"]) =>
  loudness ? (
    `${formatNumber(loudness.sone, { decimals: 1 })} sone, ${formatNumber(loudness.phon, { decimals: 1 })} phon`
  ) : (
    <Missing why="a band that the method needs was not measured" />
  );

function facts(sheet: Sheet, shown: SheetSpectrum, baseline: SheetSpectrum | undefined): Fact[] {
  const distance = sheet.bench.microphoneDistanceMm;
  const point = sheet.points.find((each) => each.setSpeed === shown.setSpeed);
  const others = point?.otherPositions ?? [];
  return [
    { label: "Loudness, read at the microphone", value: loudnessWords(shown.loudness) },
    ...(baseline ? [{ label: "The baseline’s, read there too", value: loudnessWords(baseline.loudness) }] : []),
    ...(point
      ? [
          {
            label: `Level, ${sheet.protocol.positions.join(" and ")}`,
            value: formatLevel(point.levelDba.value, distance, { upperBound: point.upperBound }),
          },
        ]
      : []),
    ...others.map((other) => ({ label: `Level, ${other.name}`, value: formatLevel(other.levelDba, distance) })),
  ];
}

/** Third-octave bands over the baseline's, the tones in them and the loudness; absent where no spectrum was measured. */
export function SpectrumSection({ sheet, asked }: { sheet: Sheet; asked: SpectrumAsked }) {
  const chosen = sheet.spectra && chosenSpectrum(sheet, sheet.spectra, asked);
  if (!chosen) return null;
  const { shown, baseline, speeds, positions } = chosen;
  const distance = sheet.bench.microphoneDistanceMm;
  const unit = bandUnit(distance);
  const setUnit = sheet.protocol.setting === "rpm" ? "rpm" : "% drive";
  const speed = `${formatNumber(shown.setSpeed)} ${setUnit}`;
  const stages = sheet.traits.stages;
  const tones = markedTones(shown.tones, stages);
  const bands = chartBands(shown.bands);
  const baselineName = sheet.baseline ? `baseline ${sheet.baseline.serial}` : "baseline";
  const line = baseline && { key: "baseline", name: baselineName, bands: chartBands(baseline.bands) };
  const corrected = shown.backgroundIds.length > 0;
  const hrefOf = (next: SpectrumAsked) => {
    const query = new URLSearchParams({ entry: sheet.entryId, speed: String(next.speed ?? shown.setSpeed) });
    if (positions.length > 1) query.set("position", next.position ?? shown.position);
    return `/designs/${sheet.slug}?${query.toString()}#spectrum`;
  };
  return (
    <Section id="spectrum" title="Spectrum" note={`${shown.position}, at ${speed}`}>
      <ChoiceLinks
        label="Set speed"
        items={speeds.map((each) => ({
          words: `${formatNumber(each)} ${setUnit}`,
          href: hrefOf({ speed: each }),
          shown: each === shown.setSpeed,
        }))}
      />
      <ChoiceLinks
        label="Microphone position"
        items={positions.map((each) => ({
          words: each,
          href: hrefOf({ position: each }),
          shown: each === shown.position,
        }))}
      />
      <SpectrumChart
        bands={bands}
        tones={tones}
        baseline={line}
        unit={unit}
        fileName={`${sheet.slug}-spectrum-${shown.setSpeed}`}
        summary={`At ${speed}: ${spectrumSummary(bands, tones, unit, line)}`}
        caption={
          <>
            {prominentSentence(shown.tones, stages)} A bar is solid where a tone found in it fits blade passing, hatched
            where it fits rotor interaction hatched{line ? `; dashed with squares: ${baselineName}` : ""}. Levels are
            unweighted,{" "}
            {corrected
              ? "with the background taken out; a pale bar is an upper bound, the background was too near."
              : "as read: no background spectrum was measured."}
          </>
        }
      />
      <div className="mt-5">
        <Facts flow="strip" facts={facts(sheet, shown, baseline)} />
        <p className="small-print mt-2">
          Loudness is of the bands as read where the microphone stood, {millimetres(distance)} from the fan, not where
          somebody sits (ISO 532-1, stationary, free field). From {countWords(shown.runs, "run")}; no uncertainty is
          given.
          {stackReadsHigh(sheet)
            ? " The inlet stack stands close to the microphone: the spectrum on axis may read high for that, and nothing is corrected for it."
            : ""}
        </p>
      </div>
      {shown.tones.length > 0 ? (
        <>
          <h3 className="mt-6 mb-2">Tones found</h3>
          <TonesTable tones={shown.tones} stages={stages} unit={unit} caption={`Tones found at ${speed}`} />
          <p className="small-print mt-2">
            Tone-to-noise and prominence ratio after ECMA-418-1:2024, not background-corrected; either can make a tone
            prominent. A tone fits a prediction within one line or 0.5 % of its frequency, whichever is more.
          </p>
        </>
      ) : (
        <p className="mt-4">No tone stands out of the noise around it.</p>
      )}
      {shown.predicted.length > 0 ? (
        <Fold title={`All ${shown.predicted.length} tones predicted at this speed`} className="mt-3">
          <PredictionsTable spectrum={shown} stages={stages} />
        </Fold>
      ) : null}
      {baseline && baseline.tones.length > 0 ? (
        <Fold title={`Tones of ${baselineName} at this speed`}>
          <TonesTable tones={baseline.tones} stages={1} unit={unit} caption={`Tones of ${baselineName} at ${speed}`} />
        </Fold>
      ) : null}
    </Section>
  );
}
