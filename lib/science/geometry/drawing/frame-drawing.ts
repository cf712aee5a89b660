import type { FanLimits } from "../fit/fan-limits";
import type { FrameSpec } from "../frames";
import type { Bounds } from "../mesh";
import { DimensionWriter, pathOf, type DrawnView } from "./drawn-view";

/** Two views of what a fan must fit, to one scale. */
export interface FittingDrawing {
  readonly front: DrawnView;
  readonly side: DrawnView;
}

/** A solid by its box, in cooler coordinates, mm. */
export interface NamedBox extends Bounds {
  readonly name: string;
}

/** One decimal, or as many as the figure has up to three: a drawing never rounds what a row says. */
const mm = (value: number): string =>
  value.toFixed(Math.abs(value * 10 - Math.round(value * 10)) < 1e-6 ? 1 : 3).replace(/(\.\d\d)0$/, "$1");

const n = (value: number): string => String(Math.round(value * 1000) / 1000);

/** A circle as path data; y up or down makes no difference to one about a point given y up. */
function circle(x: number, y: number, diameter: number): string {
  const r = diameter / 2;
  return `M${n(x - r)} ${n(-y)}A${n(r)} ${n(r)} 0 1 0 ${n(x + r)} ${n(-y)}A${n(r)} ${n(r)} 0 1 0 ${n(x - r)} ${n(-y)}Z`;
}

const box = (x0: number, y0: number, x1: number, y1: number): string => `${pathOf([x0, y0, x1, y0, x1, y1, x0, y1])}Z`;

/** Height of the words on a frame's drawing, mm: to read at true size on paper. */
const TEXT_MM = 3.5;

/**
 * A frame with its limits: front with bore, hole pattern and the widest rotor that tolerances leave; side with depth,
 * the season's inlet stack and depth in all. Only dimensions are written that a row holds or that follow from one. The
 * cooler's mounting face is at 0, at the left of the side view.
 */
export function frameDrawing(frame: FrameSpec, limits: FanLimits): FittingDrawing {
  return { front: frontOf(frame), side: sideOf(frame, limits) };
}

function frontOf(frame: FrameSpec): DrawnView {
  const { sizeMm, boreMm, holeSpacingMm, holeMm, toleranceMm } = frame;
  const [half, hole] = [sizeMm / 2, holeSpacingMm / 2];
  const writer = new DimensionWriter({ minX: -half, minY: -half, maxX: half, maxY: half }, TEXT_MM);
  const swept = boreMm - 2 * toleranceMm;
  const below = (row: number): number => -half - (2 + 2.3 * row) * TEXT_MM;
  writer.level(-boreMm / 2, boreMm / 2, below(0), 0, `bore Ø ${mm(boreMm)}`);
  writer.level(-hole, hole, below(1), -hole, mm(holeSpacingMm));
  writer.level(-half, half, below(2), -half, mm(sizeMm));
  const above = half + 1.4 * TEXT_MM;
  writer.level(-swept / 2, swept / 2, above + 2.3 * TEXT_MM, 0, `swept at most Ø ${mm(swept)}`);
  writer.level(hole - holeMm / 2, hole + holeMm / 2, above, hole, `4 × Ø ${mm(holeMm)}`);
  writer.upright(-hole, hole, -half - 2 * TEXT_MM, -hole, mm(holeSpacingMm));
  const holes = [-hole, hole].flatMap((x) => [-hole, hole].map((y) => circle(x, y, holeMm)));
  const reach = 0.5 * TEXT_MM;
  return writer.view({
    title: `Front of the frame: ${mm(sizeMm)} mm square, bore Ø ${mm(boreMm)} mm, four holes of Ø ${mm(holeMm)} mm, ${mm(holeSpacingMm)} mm apart; swept diameter at most ${mm(swept)} mm`,
    outlines: [box(-half, -half, half, half), circle(0, 0, boreMm), ...holes].map((d) => ({ d, covers: false })),
    dashed: circle(0, 0, swept),
    centres: pathOf([-half - reach, 0, half + reach, 0]) + pathOf([0, -half - reach, 0, half + reach]),
  });
}

function sideOf(frame: FrameSpec, limits: FanLimits): DrawnView {
  const { sizeMm, depthMm, boreMm } = frame;
  const { totalDepthMaxMm: total, inletStackMaxMm: inlet } = limits;
  const half = sizeMm / 2;
  const most = Math.max(depthMm, depthMm + (inlet ?? 0), total ?? 0);
  const writer = new DimensionWriter({ minX: 0, minY: -half, maxX: most, maxY: half }, TEXT_MM);
  writer.level(0, depthMm, half + 1.4 * TEXT_MM, half, mm(depthMm));
  if (inlet !== null && inlet > 0) {
    writer.level(depthMm, depthMm + inlet, half + 3.7 * TEXT_MM, boreMm / 2, `inlet ≤ ${mm(inlet)}`);
  }
  if (total !== null) writer.level(0, total, -half - 2 * TEXT_MM, -half, `in all ≤ ${mm(total)}`);
  writer.note(-1.2 * TEXT_MM, 0, "cooler", true);
  const bore = [boreMm / 2, -boreMm / 2].map((y) => pathOf([0, y, depthMm, y])).join("");
  const stack = inlet !== null && inlet > 0 ? box(depthMm, -boreMm / 2, depthMm + inlet, boreMm / 2) : "";
  const end = total === null ? "" : pathOf([total, -half, total, half]);
  const said = [
    `${mm(depthMm)} mm deep`,
    inlet === null ? "" : `inlet stack at most ${mm(inlet)} mm`,
    total === null ? "" : `at most ${mm(total)} mm in all`,
  ];
  return writer.view({
    title: `Side of the frame, the cooler at the left: ${said.filter(Boolean).join(", ")}`,
    outlines: [{ d: box(0, -half, depthMm, half), covers: false }],
    dashed: bore + stack + end,
    centres: pathOf([-0.5 * TEXT_MM, 0, most + 0.5 * TEXT_MM, 0]),
  });
}

const SMALL_TEXT_SHARE = 1 / 32;

/**
 * What stands around the cooler beside a frame on its mounting face: front with x to the right and y up, side with z,
 * away from the cooler, to the right. Solids are drawn by their boxes.
 */
export function surroundingsDrawing(frame: FrameSpec, solids: readonly NamedBox[]): FittingDrawing {
  const half = frame.sizeMm / 2;
  const view = (title: string, across: 0 | 2, fan: string): DrawnView => {
    const flat = solids.map(({ name, min, max }) => ({
      name,
      at: [min[across], min[1], max[across], max[1]] as const,
    }));
    const own = across === 0 ? ([-half, -half, half, half] as const) : ([0, -half, frame.depthMm, half] as const);
    const all = [...flat.map(({ at }) => at), own];
    const extent = {
      minX: Math.min(...all.map(([x]) => x)),
      minY: Math.min(...all.map(([, y]) => y)),
      maxX: Math.max(...all.map(([, , x]) => x)),
      maxY: Math.max(...all.map(([, , , y]) => y)),
    };
    const textMm = SMALL_TEXT_SHARE * Math.max(extent.maxY - extent.minY, 100);
    const writer = new DimensionWriter(extent, textMm);
    for (const { name, at } of flat) {
      const [x0, y0, x1, y1] = at;
      // Along the longer side, or beside a box that both ways are too short for.
      const upright = y1 - y0 > x1 - x0;
      const fits = Math.min(x1 - x0, y1 - y0) > 1.3 * textMm;
      const beside = x0 + x1 < 0 ? x0 - 0.9 * textMm : x1 + 0.9 * textMm;
      writer.note(
        fits || !upright ? (x0 + x1) / 2 : beside,
        fits || upright ? (y0 + y1) / 2 : y1 + textMm,
        name,
        upright,
      );
    }
    return writer.view({
      title: `${title}: ${solids.map(({ name }) => name).join(", ") || "nothing"} around the frame`,
      outlines: [...flat.map(({ at }) => ({ d: box(...at), covers: false })), { d: fan, covers: false }],
      dashed: "",
      centres: across === 0 ? "" : pathOf([0, extent.minY, 0, extent.maxY]),
    });
  };
  const front = box(-half, -half, half, half) + circle(0, 0, frame.boreMm);
  return {
    front: view("From the inlet side", 0, front),
    side: view("From the side, z to the right", 2, box(0, -half, frame.depthMm, half)),
  };
}
