import Link from "next/link";

export type PagerProps = {
  /** What is shown: "21 to 40 of 318". */
  words: string;
  previousHref?: string;
  nextHref?: string;
  label?: string;
};

/** Back and on through a list; both are addresses. */
export function Pager({ words, previousHref, nextHref, label = "Pages of this list" }: PagerProps) {
  return (
    <nav aria-label={label} className="mt-4 flex flex-wrap items-center gap-x-6 gap-y-2">
      {previousHref ? (
        <Link className="button button-small" href={previousHref} rel="prev">
          ← Earlier
        </Link>
      ) : null}
      <span className="docket">{words}</span>
      {nextHref ? (
        <Link className="button button-small" href={nextHref} rel="next">
          Further →
        </Link>
      ) : null}
    </nav>
  );
}
