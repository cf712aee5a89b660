import { siteOrigin } from "@/lib/env/site";
import type { Thumbnail } from "@/lib/contracts/drawing";
import type { Sheet } from "@/lib/contracts/sheet";
import { drawingOfTraits, type DeclaredRotor } from "@/lib/science/geometry/drawing/traits-drawing";
import { pngOf } from "@/lib/services/pictures/png";
import { isDemo } from "../demo-mail";
import { readSheetDrawing } from "../reading/sheet-drawing";
import { readSheetPage, type SheetAsked } from "../reading/sheet-page";
import { shareSvg } from "./share-svg";

/** The front by the traits, where there is no mesh; undefined where too few of them are known. */
function frontByTraits({ traits }: Sheet): Thumbnail | undefined {
  const rotors = traits.rotors.flatMap((rotor): DeclaredRotor[] => {
    const { hubDiameterMm, tipDiameterMm, pitchMidDeg, chordMidMm, blades, shroud } = rotor;
    if (hubDiameterMm === null || tipDiameterMm === null || pitchMidDeg === null || chordMidMm === null) return [];
    const hand = rotor.hand === "left" ? "left" : "right";
    return [{ blades, hand, hubDiameterMm, tipDiameterMm, pitchMidDeg, chordMidMm, shroud }];
  });
  if (rotors.length !== traits.rotors.length) return undefined;
  const { spacerMm, inletStackMm } = traits;
  const front = drawingOfTraits({ rotors, spacerMm, inletStackMm })?.front;
  // Without the room for dimensions, which a picture leaves out.
  const across = 1.02 * Math.max(...rotors.map((rotor) => rotor.tipDiameterMm));
  const square = { minX: -across / 2, minY: -across / 2, width: across, height: across };
  return front && { ...square, d: front.outlines.map(({ d }) => d).join("") };
}

/**
 * The picture that stands beside a link to a sheet: name, the four figures and the fan, as PNG. Of published entries
 * alone.
 * @throws ExpectedError not_found or gone, as the sheet
 */
export async function sharePicture(asked: SheetAsked): Promise<Uint8Array<ArrayBuffer>> {
  const sheet = await readSheetPage(asked);
  const drawn = await readSheetDrawing({ entryId: sheet.entryId });
  const note = isDemo() ? "Demo: every design, person and figure is invented." : undefined;
  return pngOf(shareSvg(sheet, drawn?.thumbnail ?? frontByTraits(sheet), note));
}

/** Where that picture is, in full, as those who show links ask for it. */
export const sharePictureAddress = ({ slug, entryId }: { slug: string; entryId: string }): string =>
  `${siteOrigin()}/api/v1/sheets/${slug}/picture.png?entry=${entryId}`;
