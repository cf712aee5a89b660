import { Missing } from "@/components/ui/missing";
import { figureText, tailLength, type BarsCell, type ColumnWidths } from "./bars-model";

/** Room as wide as so many figures: there for the eye, not for a screen reader or the clipboard. */
function Room({ characters }: { characters: number }) {
  return characters > 0 ? (
    <span aria-hidden className="invisible select-none">
      {"0".repeat(characters)}
    </span>
  ) : null;
}

/** One cell's content, filled up so that the column stands on its decimal points. */
export function BarsCellContent({ cell, widths }: { cell: BarsCell | undefined; widths: ColumnWidths }) {
  if (!cell) return <Missing why="not given" />;
  if (!("figure" in cell)) return cell.words;
  const text = figureText(cell.figure);
  if (!text) {
    return (
      <>
        <Missing why={cell.figure.why ?? "not measured"} />
        <Room characters={widths.decimals + widths.uncertainty} />
      </>
    );
  }
  const plusMinus = text.uncertainty === undefined ? undefined : ` ±${text.uncertainty}`;
  return (
    <>
      {cell.figure.bound === "upper" ? <span aria-label="at most">≤ </span> : null}
      {text.value}
      <Room characters={widths.decimals - tailLength(text.value)} />
      {plusMinus ? <span className="value-plus-minus">{plusMinus}</span> : null}
      <Room characters={widths.uncertainty - (plusMinus?.length ?? 0)} />
    </>
  );
}
