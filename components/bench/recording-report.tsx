"use client";

import { SpectrumChart } from "@/components/charts/spectrum-chart";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Facts } from "@/components/ui/facts";
import { Value } from "@/components/ui/value";
import type { calibratorReport, SoundReportView } from "@/lib/contracts/sound-report";
import type { z } from "zod";
import { matchWords, prominentWords, stretchWords } from "./recording-words";

export type RecordingReportProps = {
  report: SoundReportView;
  calibrator: z.infer<typeof calibratorReport> | null;
  /** "100 mm": where the microphone stands. */
  distanceMm: number;
};

/** What a recording says: levels, what was left out, tones against predictions, loudness, warnings. */
export function RecordingReport({ report, calibrator, distanceMm }: RecordingReportProps) {
  const { disturbed, usedS, durationS, background, loudness, speedsRpm, tones } = report;
  // A calibrator needs 2 s, which its own warning says.
  const warnings = report.warnings.filter(({ code }) => !(calibrator && code === "short"));
  const unit = `dB(A) @ ${distanceMm} mm`;
  const why = "digital silence";
  const left = disturbed.length === 0 ? "No second was left out." : `Left out: ${stretchWords(disturbed)}.`;
  return (
    <div className="grid min-w-0 gap-4">
      <Facts
        flow="strip"
        facts={[
          { label: "Level", value: <Value value={report.levelADba} decimals={1} unit={unit} why={why} /> },
          ...(calibrator
            ? [{ label: "Calibrator reads", value: <Value value={calibrator.readDb} decimals={2} unit="dB" /> }]
            : []),
          ...(background
            ? [
                {
                  label: "Corrected for background",
                  value: (
                    <Value
                      value={report.correctedDba}
                      decimals={1}
                      unit="dB(A)"
                      bound={background.upperBound ? "upper" : undefined}
                    />
                  ),
                },
              ]
            : []),
          ...(calibrator
            ? []
            : [
                { label: "C-weighted", value: <Value value={report.levelCDb} decimals={1} unit="dB(C)" why={why} /> },
                { label: "Unweighted", value: <Value value={report.levelZDb} decimals={1} unit="dB" why={why} /> },
              ]),
          ...(loudness && !calibrator
            ? [
                {
                  label: "Loudness at the microphone",
                  value: (
                    <>
                      <Value value={loudness.sone} decimals={2} unit="sone" />,{" "}
                      <Value value={loudness.phon} decimals={1} unit="phon" />
                    </>
                  ),
                },
              ]
            : []),
          ...(speedsRpm ? [{ label: "Speed by its sound", value: `${speedsRpm.map(whole).join(", ")} rpm` }] : []),
        ]}
      />
      <p>
        {usedS.toFixed(1)} of {durationS.toFixed(1)} s are used. {left}
        {calibrator ? ` Its tone lies at ${calibrator.toneHz.toFixed(0)} Hz.` : ""}
      </p>
      {warnings.length > 0 ? (
        <ul className="list-[square] pl-5">
          {warnings.map(({ code, message }, n) => (
            <li key={`${code} ${n}`}>{message}</li>
          ))}
        </ul>
      ) : null}
      {report.levelADba === null || calibrator ? null : (
        <SpectrumChart
          caption="Third-octave bands as read, not corrected for background"
          unit="dB"
          bands={report.bands.map(({ nominalHz, levelDb }) => ({
            nominalHz,
            levelDb: levelDb ?? undefined,
            why: "beyond half the sample rate",
          }))}
          tones={tones.flatMap(({ frequencyHz, match }) =>
            match ? [{ frequencyHz, kind: match.kind, name: matchWords(match) }] : [],
          )}
        />
      )}
      {tones.length > 0 && !calibrator ? <ToneTable tones={tones} /> : null}
    </div>
  );
}

const whole = (value: number): string => value.toFixed(0);

function ToneTable({ tones }: { tones: SoundReportView["tones"] }) {
  return (
    <BarsTable
      caption="Tones found"
      showCaption
      columns={[
        { key: "frequency", head: "Frequency", unit: "Hz" },
        { key: "level", head: "Level", unit: "dB" },
        { key: "ratio", head: "Tone to noise", unit: "dB" },
        { key: "prominence", head: "Prominence ratio", unit: "dB" },
        { key: "prominent", head: "Prominent" },
        { key: "match", head: "It is" },
        { key: "residual", head: "Off the prediction", unit: "Hz" },
      ]}
      rows={tones.map((tone) => ({
        key: String(tone.frequencyHz),
        cells: {
          frequency: { figure: { value: tone.frequencyHz, decimals: 1 } },
          level: { figure: { value: tone.levelDb, decimals: 1 } },
          ratio: { figure: { value: tone.toneToNoiseDb, decimals: 1, why: "no noise beside it" } },
          prominence: { figure: { value: tone.prominenceDb, decimals: 1, why: "its bands reach too far" } },
          prominent: { words: prominentWords(tone.prominent) },
          match: { words: tone.match ? matchWords(tone.match) : "no predicted tone" },
          residual: {
            figure: { value: tone.match?.residualHz, decimals: 2, signed: true, why: "no predicted tone" },
          },
        },
      }))}
    />
  );
}
