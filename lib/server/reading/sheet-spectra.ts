import type { SetSpeedSpectrum, Snapshot, SnapshotPoint, ToneMakers } from "@/lib/contracts/publication";
import type { PredictedToneItem, SheetSpectra } from "@/lib/contracts/sheet-spectra";
import { predictTones } from "@/lib/science/acoustics/fan-tones";
import { rounded } from "@/lib/science/acoustics/sound-report";

/** A snapshot's spectra with the tones predicted at each set speed; null where the snapshot has none. */
export function sheetSpectra({ spectra, points, baselinePoints }: Snapshot): SheetSpectra | null {
  if (!spectra) return null;
  return {
    entry: spectra.entry.map((each) => withPredictions(each, points, spectra.makers.entry)),
    baseline: spectra.baseline.map((each) => withPredictions(each, baselinePoints, spectra.makers.baseline)),
  };
}

function withPredictions(spectrum: SetSpeedSpectrum, points: readonly SnapshotPoint[], makers: ToneMakers | null) {
  const rpm = points.find((point) => point.setSpeed === spectrum.setSpeed)?.speedsRpm ?? [];
  return { ...spectrum, predicted: predicted(makers, rpm) };
}

/** Tones that the rotors can make at speeds in rpm; none where blades or a rotor's speed aren't known. */
function predicted(makers: ToneMakers | null, rpm: readonly number[]): PredictedToneItem[] {
  if (!makers || rpm.length !== makers.blades.length) return [];
  const { blades, rotation, struts } = makers;
  return rounded(
    predictTones({ blades, rpm, ...(rotation && { rotation }), ...(struts !== null && struts > 0 && { struts }) }),
  );
}
