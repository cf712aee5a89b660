import sharp from "sharp";

/** Draws an SVG document as PNG, as large as it says. It must name no font and no address: nothing is fetched. */
export async function pngOf(svg: string): Promise<Uint8Array<ArrayBuffer>> {
  return Uint8Array.from(await sharp(Buffer.from(svg)).png({ compressionLevel: 9, palette: true }).toBuffer());
}
