import clsx from "clsx";
import { createElement, type ReactNode } from "react";

/** The one paper that everything stands on: the strip, the sections, the foot. */
export function Sheet({ children, className }: { children: ReactNode; className?: string }) {
  return <div className={clsx("sheet sheet-screen", className)}>{children}</div>;
}

export type SectionProps = {
  id?: string;
  title?: ReactNode;
  /** 1 for the page's title, else 2 or 3. */
  level?: 1 | 2 | 3;
  /** A few quiet words after the title. */
  note?: ReactNode;
  /** Stands at the end of the heading's line: links, a button. */
  aside?: ReactNode;
  tone?: "paper" | "bar";
  tight?: boolean;
  className?: string;
  children?: ReactNode;
};

/** A piece of the sheet between two perforations, with its own whole sprocket holes. */
export function Section({
  id,
  title,
  level = 2,
  note,
  aside,
  tone = "paper",
  tight,
  className,
  children,
}: SectionProps) {
  const headingId = id && title ? `${id}-title` : undefined;
  return (
    <section
      id={id}
      aria-labelledby={headingId}
      className={clsx("section holes", tone === "bar" && "section-bar", tight && "section-tight", className)}
    >
      {title || aside ? (
        <header className="section-head">
          <div>
            {title ? createElement(`h${level}`, { id: headingId }, title) : null}
            {note ? <span className="small-print">{note}</span> : null}
          </div>
          {aside ? <div>{aside}</div> : null}
        </header>
      ) : null}
      {children}
    </section>
  );
}
