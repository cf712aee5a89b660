import type { Thumbnail } from "@/lib/contracts/drawing";
import type { Sheet } from "@/lib/contracts/sheet";
import { lettering, type LetterFont } from "@/lib/services/pictures/letters";
import { shareFigures } from "./share-figures";

/** Size that pages which show a link's picture ask for, px (Open Graph names none; common practice, no source). */
export const SHARE_SIZE = { width: 1200, height: 630 } as const;

/** The sheet's print by day. */
const colour = { desk: "#d9d8cf", paper: "#fdfcf7", bar: "#e6f0e1", rule: "#b9c9b4", ink: "#1b2724", soft: "#5a6a64" };
const LEFT = 92;
const DRAWING = { x: 760, y: 150, size: 340 };
const GRID = { top: 262, row: 152, column: 340 };

interface Said {
  readonly font?: LetterFont;
  readonly fill?: string;
  /** Strokes the outlines, as the file has one weight. */
  readonly bold?: boolean;
  /** Shrinks the letters until the line is no wider, px. */
  readonly widthMax?: number;
}

function say(text: string, size: number, x: number, y: number, said: Said = {}): string {
  const { font = "words", fill = colour.ink, bold = false, widthMax = Infinity } = said;
  const natural = lettering(text, font, size).width;
  const fitted = natural > widthMax ? (size * widthMax) / natural : size;
  const stroke = bold ? ` stroke="${fill}" stroke-width="${(fitted * 0.045).toFixed(2)}" stroke-linejoin="round"` : "";
  return `<path d="${lettering(text, font, fitted, x, y).d}" fill="${fill}"${stroke}/>`;
}

function holes(x: number): string {
  return Array.from({ length: 14 }, (_, i) => {
    const y = 32 + i * 43.5;
    return `<circle cx="${x}" cy="${y}" r="9" fill="${colour.desk}" stroke="#8b8e84" stroke-width="1.5"/>`;
  }).join("");
}

const perforation = (d: string): string =>
  `<path d="${d}" stroke="${colour.rule}" stroke-width="2" stroke-dasharray="7 6" fill="none"/>`;

/** The fan drawn into a square; nothing where neither mesh nor traits tell enough. */
function fan(front: Thumbnail | undefined): string {
  if (!front) return "";
  const scale = DRAWING.size / Math.max(front.width, front.height);
  const x = DRAWING.x + (DRAWING.size - front.width * scale) / 2 - front.minX * scale;
  const y = DRAWING.y + (DRAWING.size - front.height * scale) / 2 - front.minY * scale;
  return `<path d="${front.d}" transform="translate(${x.toFixed(2)} ${y.toFixed(2)}) scale(${scale.toFixed(5)})" fill="none" stroke="${colour.ink}" stroke-width="${(1.8 / scale).toFixed(4)}" stroke-linejoin="round" stroke-linecap="round"/>`;
}

/** The share picture of a sheet as SVG: name, four figures and the fan's front, all as outlines. */
export function shareSvg(sheet: Sheet, front: Thumbnail | undefined, note: string | undefined): string {
  const { width, height } = SHARE_SIZE;
  const title = `${sheet.name} ${sheet.letter}`;
  const docket = `${sheet.season.title} · round ${sheet.round} · ${sheet.bench.name}, version ${sheet.bench.version} · method ${sheet.methodVersion}`;
  const figures = shareFigures(sheet).map(({ label, value, note: beside }, i) => {
    const [x, y] = [LEFT + (i % 2) * GRID.column, GRID.top + Math.floor(i / 2) * GRID.row];
    return (
      say(label, 19, x, y + 30, { fill: colour.soft, widthMax: GRID.column - 24 }) +
      say(value, 62, x, y + 90, { font: "figures", bold: true, widthMax: GRID.column - 24 }) +
      say(beside, 19, x, y + 122, { fill: colour.soft, widthMax: GRID.column - 24 })
    );
  });
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">` +
    `<rect width="${width}" height="${height}" fill="${colour.paper}"/>` +
    `<rect x="56" y="${GRID.top}" width="${width - 112}" height="${GRID.row - 12}" fill="${colour.bar}"/>` +
    holes(28) +
    holes(width - 28) +
    perforation(`M56 0V${height}M${width - 56} 0V${height}M56 92H${width - 56}M56 572H${width - 56}`) +
    say("Fanfold", 34, LEFT, 60, { font: "figures", bold: true }) +
    say("bench comparisons of printed cooling fans", 22, LEFT + 190, 59, { fill: colour.soft }) +
    say(title, 72, LEFT, 176, { bold: true, widthMax: DRAWING.x - LEFT - 40 }) +
    say(docket, 20, LEFT, 222, { fill: colour.soft, widthMax: DRAWING.x - LEFT - 40 }) +
    figures.join("") +
    `<g>${fan(front)}</g>` +
    say(note ?? "± is 95 % coverage. Minus is cooler, minus is quieter.", 20, LEFT, 608, { fill: colour.soft }) +
    "</svg>"
  );
}
