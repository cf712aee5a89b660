import type { ReactNode } from "react";

export type BigFigure = {
  label: ReactNode;
  /** Already written for people: "−2.4", "3rd", "38–55". */
  value: ReactNode;
  /** Uncertainty, range and unit, in quieter type after the figure. */
  note?: ReactNode;
  /** Where the figure comes from. */
  href?: string;
};

/** The few figures that matter, big. */
export function FigureBlock({ figures }: { figures: readonly BigFigure[] }) {
  return (
    <dl className="figure-block">
      {figures.map((figure, index) => (
        <div key={index}>
          <dt className="figure-label">{figure.label}</dt>
          <dd className="figure-value">
            <span className="figure-big">{figure.href ? <a href={figure.href}>{figure.value}</a> : figure.value}</span>
            {figure.note ? <span className="figure-note">{figure.note}</span> : null}
          </dd>
        </div>
      ))}
    </dl>
  );
}
