import { DimensionWriter, pathOf, type DrawnView } from "./drawn-view";

/** What is written on a fan's drawing, mm. Heights run along the axis, which is to the right in the side view. */
export interface DimensionedRotor {
  readonly blades: number;
  readonly hand: "right" | "left";
  readonly tipDiameterMm: number;
  readonly sweptDiameterMm: number;
  readonly hubDiameterMm: number;
  readonly fromMm: number;
  readonly toMm: number;
}

/** Lines of one view with their extent, about the rotors' axis, y up. */
export interface PlainView {
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
  readonly outlines: DrawnView["outlines"];
  readonly dashed?: string;
}

const mm = (value: number): string => value.toFixed(1);
const TEXT_SHARE = 1 / 22;

/** Height of the words on a drawing, from the front view's longer side, mm. */
export const textHeightMm = (view: PlainView): number =>
  TEXT_SHARE * Math.max(view.maxX - view.minX, view.maxY - view.minY);

const list = (values: readonly string[]): string => values.join(" + ");

/** The front view with hub, tip and swept diameter; without rotors with its overall width. */
export function dimensionedFront(view: PlainView, rotors: readonly DimensionedRotor[], textMm: number): DrawnView {
  const writer = new DimensionWriter(view, textMm);
  const [first] = rotors;
  const { minX, maxX, minY, maxY } = view;
  let below = minY - 2 * textMm;
  const diameter = (value: number, y: number, witnessY: number): void =>
    writer.level(-value / 2, value / 2, y, witnessY, `Ø ${mm(value)}`);
  if (first) {
    diameter(first.tipDiameterMm, below, 0);
    below -= 2.2 * textMm;
    if (first.sweptDiameterMm - first.tipDiameterMm > 0.05) diameter(first.sweptDiameterMm, below, 0);
    diameter(first.hubDiameterMm, maxY + 1.4 * textMm, 0);
  } else writer.level(minX, maxX, below, minY, mm(maxX - minX));
  const reach = 0.5 * textMm;
  return writer.view({
    title: first
      ? `Front view: ${list(rotors.map((rotor) => `${rotor.blades} blades, ${rotor.hand}-handed`))}; tip Ø ${mm(first.tipDiameterMm)} mm, hub Ø ${mm(first.hubDiameterMm)} mm`
      : `Front view, ${mm(maxX - minX)} mm wide`,
    outlines: view.outlines,
    dashed: view.dashed ?? "",
    centres: first ? pathOf([minX - reach, 0, maxX + reach, 0]) + pathOf([0, minY - reach, 0, maxY + reach]) : "",
  });
}

/** The side view with each rotor's depth, the depth in all and the largest height; without depths that aren't known. */
export function dimensionedSide(
  view: PlainView,
  rotors: readonly DimensionedRotor[],
  textMm: number,
  depthsKnown = true,
): DrawnView {
  const writer = new DimensionWriter(view, textMm);
  const { minX, maxX, minY, maxY } = view;
  if (depthsKnown) {
    rotors.forEach((rotor, index) => {
      // Neighbours stand at two heights, so that their numbers don't meet.
      const y = maxY + (1.4 + 2.2 * (index % 2)) * textMm;
      writer.level(rotor.fromMm, rotor.toMm, y, 0, mm(rotor.toMm - rotor.fromMm));
    });
    writer.level(minX, maxX, minY - 2 * textMm, minY, mm(maxX - minX));
  }
  writer.upright(minY, maxY, minX - 1.6 * textMm, minX, mm(maxY - minY));
  const reach = 0.5 * textMm;
  return writer.view({
    title: `Side view: ${depthsKnown ? `${mm(maxX - minX)} mm along the axis, ` : ""}${mm(maxY - minY)} mm across`,
    outlines: view.outlines,
    dashed: view.dashed ?? "",
    centres: rotors.length > 0 ? pathOf([minX - reach, 0, maxX + reach, 0]) : "",
  });
}
