import Link from "next/link";

export type ChoiceLink = { words: string; href: string; shown: boolean };

/** Which of several views the address shows, as links; absent where there is nothing to choose. */
export function ChoiceLinks({ label, items }: { label: string; items: readonly ChoiceLink[] }) {
  if (items.length < 2) return null;
  return (
    <nav aria-label={label} className="screen-only mb-3 flex flex-wrap items-baseline gap-x-5 gap-y-1">
      <span className="small-print">{label}</span>
      {items.map(({ words, href, shown }) => (
        <Link
          key={href}
          href={href}
          scroll={false}
          aria-current={shown ? "true" : undefined}
          className={shown ? "font-bold" : undefined}
        >
          {words}
        </Link>
      ))}
    </nav>
  );
}
