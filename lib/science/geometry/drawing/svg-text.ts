import type { DrawnView, FanDrawing } from "./drawn-view";

/** Colours of a drawing that stands alone: the sheet's, in its light print. */
const INK = "#1b2724";
const SOFT = "#5a6a64";
const PAPER = "#fdfcf7";

const escaped = (text: string): string => text.replaceAll("&", "&amp;").replaceAll("<", "&lt;").replaceAll(">", "&gt;");
const n = (value: number): string => String(Math.round(value * 100) / 100);

function group(view: DrawnView, x: number, y: number): string {
  const { textMm } = view;
  const line = textMm / 14;
  const outlines = view.outlines
    .map(
      ({ d, covers }) => `<path d="${d}" fill="${covers ? PAPER : "none"}" stroke="${INK}" stroke-width="${n(line)}"/>`,
    )
    .join("");
  const thin = (d: string, dash: string): string =>
    d && `<path d="${d}" fill="none" stroke="${SOFT}" stroke-width="${n(line / 2)}"${dash}/>`;
  const words = view.words
    .map(({ x: at, y: down, text, upright }) => {
      const turn = upright ? ` transform="rotate(-90 ${n(at)} ${n(down)})"` : "";
      return `<text x="${n(at)}" y="${n(down)}"${turn}>${escaped(text)}</text>`;
    })
    .join("");
  const dashes = (...parts: number[]): string =>
    ` stroke-dasharray="${parts.map((part) => n(part * textMm)).join(" ")}"`;
  return (
    `<g transform="translate(${n(x)} ${n(y)})"><title>${escaped(view.title)}</title>` +
    `<g stroke-linecap="round" stroke-linejoin="round">${outlines}</g>` +
    thin(view.centres, dashes(1.6, 0.3, 0.3, 0.3)) +
    thin(view.dashed, dashes(0.6, 0.4)) +
    thin(view.dimensions, "") +
    `<g fill="${INK}" font-family="Atkinson Hyperlegible Mono, monospace" font-size="${n(textMm)}" text-anchor="middle">${words}</g></g>`
  );
}

/** Both views side by side as one SVG document in true size (mm), the axis at one height in both. */
export function drawingSvg({ front, side }: Pick<FanDrawing, "front" | "side">): string {
  const gap = 2 * front.textMm;
  const width = front.width + gap + side.width;
  const top = Math.min(front.minY, side.minY);
  const height = Math.max(front.minY + front.height, side.minY + side.height) - top;
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" width="${n(width)}mm" height="${n(height)}mm" viewBox="0 0 ${n(width)} ${n(height)}">` +
    `<rect width="100%" height="100%" fill="${PAPER}"/>` +
    group(front, -front.minX, -top) +
    group(side, front.width + gap - side.minX, -top) +
    "</svg>"
  );
}
