import { createElement } from "react";
import { renderToStaticMarkup } from "react-dom/server";
import { expect, it } from "vitest";
import { RecordingReport } from "@/components/bench/recording-report";
import { soundReport } from "@/lib/contracts/sound-report";
import { formatNumber } from "@/lib/format/numbers";
import { analyseRecording } from "@/lib/science/acoustics/analyse-recording";
import { fanWav } from "../../factories/recordings";

const tones = [
  [169.2, 50],
  [338.4, 44],
  [700, 46],
] as const;

/** Text of the page, its tags as blanks; what only fills up columns is left out. */
const textOf = (markup: string): string =>
  markup
    .replace(/<span aria-hidden="true"[^>]*>0*<\/span>/g, "")
    .replace(/<[^>]+>/g, " ")
    .replace(/\s+/g, " ");

it("shows the report's own digits: levels, stretches left out, tones and bands", async () => {
  const { report } = await analyseRecording(fanWav({ tones, bangAtS: 4 }), {
    calibration: { fullScaleDb: 120 },
    rotors: { blades: [7], rpm: [1450] },
  });
  const shown = soundReport.parse(JSON.parse(JSON.stringify(report)));
  const markup = renderToStaticMarkup(
    createElement(RecordingReport, { report: shown, calibrator: null, distanceMm: 100 }),
  );
  const text = textOf(markup);
  const digits = (value: number | null | undefined, decimals: number) =>
    formatNumber(value ?? Number.NaN, { decimals });
  expect(text).toContain(`${digits(shown.levelADba, 1)} dB(A) @ 100 mm`);
  expect(text).toContain(`${digits(shown.levelCDb, 1)} dB(C)`);
  expect(text).toContain(`${digits(shown.levelZDb, 1)} dB `);
  expect(text).toContain(`${digits(shown.loudness?.sone, 2)} sone`);
  expect(text).toContain("11.0 of 12.0 s are used. Left out: 4 to 5 s.");
  // As the file was made: its tones, by frequency.
  expect(shown.tones.map((tone) => Math.round(tone.frequencyHz))).toEqual(tones.map(([hz]) => Math.round(hz)));
  for (const { frequencyHz, levelDb, toneToNoiseDb, prominenceDb } of shown.tones) {
    const row = [frequencyHz, levelDb, toneToNoiseDb, prominenceDb].map((value) => digits(value, 1)).join(" ");
    expect(text).toContain(row);
  }
  for (const { levelDb } of shown.bands) expect(text).toContain(` ${digits(levelDb, 1)} `);
});
