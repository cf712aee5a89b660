import clsx from "clsx";
import Link from "next/link";
import { BarsCellContent } from "./bars-cell";
import { columnLabel, columnWidths, isFigureColumn, type BarsColumn, type BarsRow } from "./bars-model";
import { ScrollRegion } from "./scroll-region";

export type BarsTableProps = {
  /** What the table holds; only heard unless `showCaption`. */
  caption: string;
  showCaption?: boolean;
  columns: readonly BarsColumn[];
  rows: readonly BarsRow[];
  /** The column that names the row; the first when not given. */
  nameColumn?: string;
  /** On a phone: keep the naming column and scroll, or fold to labels and values. */
  phone?: "scroll" | "fold";
};

function Head({ column, figures, names }: { column: BarsColumn; figures: boolean; names: boolean }) {
  const words = (
    <>
      {column.head}
      {column.unit ? (
        <>
          <span className="sr-only">, </span>
          <br />
          <span className="whitespace-nowrap">{column.unit}</span>
        </>
      ) : null}
    </>
  );
  const arrow = column.sort?.now === "descending" ? " ▼" : column.sort?.now === "ascending" ? " ▲" : null;
  return (
    <th
      scope="col"
      aria-sort={column.sort?.now}
      className={clsx(
        column.hideHead && "is-heard",
        names && "is-name",
        figures && "is-figure",
        column.short && "is-short",
        column.tone === "baseline" && "is-baseline",
      )}
    >
      {column.hideHead ? <span className="sr-only">{column.head}</span> : null}
      {!column.hideHead && column.sort ? (
        <Link className="bars-sort" href={column.sort.href} scroll={false}>
          {words}
          {arrow ? <span aria-hidden>{arrow}</span> : null}
        </Link>
      ) : null}
      {!column.hideHead && !column.sort ? words : null}
    </th>
  );
}

/** Figures on pale green bars, two rows by two, right-aligned on the decimal point, units once in the head. */
export function BarsTable(props: BarsTableProps) {
  const { caption, showCaption, columns, rows, nameColumn = columns[0]?.key, phone = "scroll" } = props;
  const shapes = columns.map((column) => ({
    column,
    figures: isFigureColumn(rows, column.key),
    widths: columnWidths(rows, column.key),
    label: columnLabel(column),
  }));
  return (
    <ScrollRegion label={caption}>
      <table className={clsx("bars", phone === "fold" ? "folds" : "keeps-name")}>
        <caption className={showCaption ? undefined : "sr-only"}>{caption}</caption>
        <thead>
          <tr>
            {shapes.map(({ column, figures }) => (
              <Head key={column.key} column={column} figures={figures} names={column.key === nameColumn} />
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.key}>
              {shapes.map(({ column, figures, widths, label }) => {
                const names = column.key === nameColumn;
                const Cell = names ? "th" : "td";
                return (
                  <Cell
                    key={column.key}
                    scope={names ? "row" : undefined}
                    data-label={names ? undefined : label}
                    className={clsx(
                      names && "is-name",
                      figures && "is-figure",
                      column.short && "is-short",
                      column.tone === "strong" && "is-strong",
                      (row.tone === "baseline" || column.tone === "baseline") && "is-baseline",
                      row.tone === "wrong" && "is-wrong",
                    )}
                  >
                    <BarsCellContent cell={row.cells[column.key]} widths={widths} />
                  </Cell>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollRegion>
  );
}
