import { PDFDocument, StandardFonts, degrees, rgb, type PDFFont, type PDFPage } from "pdf-lib";
import type { DrawnView } from "@/lib/science/geometry/drawing/drawn-view";
import { FRAME_PRESET_NOTE } from "@/lib/science/geometry/frames";
import { formatFrame } from "@/lib/format/frames";
import { kitDrawing, kitFileName } from "./kit-drawing";
import { kitFrameOf } from "./read-kit";

const PT_PER_MM = 72 / 25.4;
/** ISO 216 A4, lying, mm. */
const PAGE = { width: 297, height: 210 };
const MARGIN_MM = 12;
const HEAD_MM = 16;
const ink = rgb(0.106, 0.153, 0.141);
const soft = rgb(0.353, 0.416, 0.392);

/** Words in the letters that the standard fonts of PDF have (ISO 32000-1, annex D). */
const plain = (text: string): string =>
  text
    .replace(/[−–]/g, "-")
    .replace(/≤ ?/g, "max. ")
    .replace(/[^\x20-\x7e\xa1-\xff]/g, "?");

/** The frame's drawing on one A4 page, in true size where it fits, drawn from the same views as the SVG. */
export async function kitPdf(asked: { slug: string; frame: string }): Promise<{ name: string; bytes: Uint8Array }> {
  const { kit, frame } = await kitFrameOf(asked);
  const { front, side } = kitDrawing(kit, frame);
  const gap = 2 * front.textMm;
  const top = Math.min(front.minY, side.minY);
  const height = Math.max(front.minY + front.height, side.minY + side.height) - top;
  const room = { width: PAGE.width - 2 * MARGIN_MM, height: PAGE.height - 2 * MARGIN_MM - HEAD_MM };
  const scale = Math.min(1, room.width / (front.width + gap + side.width), room.height / height);
  const pdf = await PDFDocument.create();
  pdf.setTitle(plain(`${kit.season.title}: frame ${frame.key}`));
  // The same rows give the same bytes.
  pdf.setCreationDate(new Date(0));
  pdf.setModificationDate(new Date(0));
  const page = pdf.addPage([PAGE.width * PT_PER_MM, PAGE.height * PT_PER_MM]);
  const font = await pdf.embedFont(StandardFonts.Helvetica);
  const bold = await pdf.embedFont(StandardFonts.HelveticaBold);
  const yOfTop = PAGE.height - MARGIN_MM;
  const say = (text: string, y: number, sizeMm: number, as: PDFFont, color = ink) =>
    page.drawText(plain(text), {
      x: MARGIN_MM * PT_PER_MM,
      y: y * PT_PER_MM,
      size: sizeMm * PT_PER_MM,
      font: as,
      color,
    });
  say(`${kit.season.title}: frame ${formatFrame(frame.key)} mm and its limits`, yOfTop - 5, 5, bold);
  const told = `Dimensions in mm. ${scale === 1 ? "True size on A4: print without scaling" : `Scale ${scale.toFixed(2)} : 1`}. Tolerance ${frame.toleranceMm} mm a side. ${FRAME_PRESET_NOTE}.`;
  say(told, yOfTop - 11, 3, font, soft);
  const axisY = yOfTop - HEAD_MM + top * scale;
  drawView(page, font, front, MARGIN_MM - front.minX * scale, axisY, scale);
  drawView(page, font, side, MARGIN_MM + (front.width + gap - side.minX) * scale, axisY, scale);
  return { name: kitFileName(kit, frame.key, "pdf"), bytes: await pdf.save() };
}

/** One view with its origin at x, y of the page, mm from its lower left corner. */
function drawView(page: PDFPage, font: PDFFont, view: DrawnView, x: number, y: number, scale: number): void {
  const { textMm } = view;
  const line = textMm / 14;
  const at = { x: x * PT_PER_MM, y: y * PT_PER_MM, scale: scale * PT_PER_MM };
  for (const { d } of view.outlines) page.drawSvgPath(d, { ...at, borderColor: ink, borderWidth: line });
  const thin = (d: string, ...dashes: number[]): void => {
    if (d === "") return;
    const borderDashArray = dashes.map((part) => part * textMm);
    page.drawSvgPath(d, { ...at, borderColor: soft, borderWidth: line / 2, borderDashArray });
  };
  thin(view.centres, 1.6, 0.3, 0.3, 0.3);
  thin(view.dashed, 0.6, 0.4);
  thin(view.dimensions);
  const size = textMm * scale * PT_PER_MM;
  for (const words of view.words) {
    const text = plain(words.text);
    const half = font.widthOfTextAtSize(text, size) / 2;
    const [px, py] = [at.x + words.x * at.scale, at.y - words.y * at.scale];
    const placed = words.upright ? { x: px, y: py - half, rotate: degrees(90) } : { x: px - half, y: py };
    page.drawText(text, { ...placed, size, font, color: ink });
  }
}
