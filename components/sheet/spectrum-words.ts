import type { Sheet } from "@/lib/contracts/sheet";
import type { SheetSpectra, SheetSpectrum } from "@/lib/contracts/sheet-spectra";

/** The spectra of a position, by set speed, and which of them the address or the headline level chooses. */
export function chosenSpectrum(
  sheet: Pick<Sheet, "points" | "headlineDba">,
  spectra: SheetSpectra,
  asked: { speed?: number; position?: string },
): { shown: SheetSpectrum; baseline: SheetSpectrum | undefined; speeds: number[]; positions: string[] } | undefined {
  const positions = [...new Set(spectra.entry.map((each) => each.position))];
  const first = spectra.entry.find((each) => each.ofProtocol) ?? spectra.entry[0];
  const position = positions.find((each) => each === asked.position) ?? first?.position;
  const here = spectra.entry.filter((each) => each.position === position);
  const levelAt = (setSpeed: number) =>
    sheet.points.find((point) => point.setSpeed === setSpeed)?.levelDba.value ?? Infinity;
  const offHeadline = (each: SheetSpectrum) => Math.abs(levelAt(each.setSpeed) - sheet.headlineDba);
  const shown =
    here.find((each) => each.setSpeed === asked.speed) ??
    here.toSorted((a, b) => offHeadline(a) - offHeadline(b) || a.setSpeed - b.setSpeed)[0];
  if (!shown) return undefined;
  return {
    shown,
    baseline: spectra.baseline.find((each) => each.position === position && each.setSpeed === shown.setSpeed),
    speeds: here.map((each) => each.setSpeed),
    positions,
  };
}
