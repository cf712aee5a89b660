import sharp from "sharp";

/** Largest picture that is opened: width × height. */
const pixelsMax = 60_000_000;
/** Longest side that is kept; a sheet shows no more. */
const sideMax = 4_000;

export type PictureKind = "png" | "jpeg" | "webp";

/**
 * Draws a photograph anew, turned as its camera says and without any metadata: place, time and camera are nobody's
 * business, and whatever was hidden in the file is gone.
 *
 * @returns undefined when it is no picture of that kind that can be opened within the limits
 */
export async function cleanPicture(bytes: Uint8Array, kind: PictureKind): Promise<Uint8Array | undefined> {
  try {
    const opened = sharp(bytes, { limitInputPixels: pixelsMax, failOn: "error" });
    const { format } = await opened.metadata();
    if (format !== kind) return undefined;
    const drawn = opened.rotate().resize({ width: sideMax, height: sideMax, fit: "inside", withoutEnlargement: true });
    if (kind === "png") return await drawn.png().toBuffer();
    if (kind === "webp") return await drawn.webp({ quality: 88 }).toBuffer();
    return await drawn.jpeg({ quality: 88 }).toBuffer();
  } catch {
    return undefined;
  }
}
