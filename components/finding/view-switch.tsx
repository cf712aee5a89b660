import Link from "next/link";
import { indexAddress, type IndexQuery } from "@/lib/contracts/index-query";

const views = [
  { view: "table", words: "Table" },
  { view: "drawings", words: "Drawings" },
] as const;

/** The same list as figures or as pictures; both are addresses. */
export function ViewSwitch({ asked }: { asked: IndexQuery }) {
  return (
    <nav aria-label="View of the list" className="flex gap-x-4">
      {views.map(({ view, words }) => (
        <Link
          key={view}
          href={indexAddress({ ...asked, view })}
          scroll={false}
          aria-current={asked.view === view ? "true" : undefined}
          className="aria-[current]:font-bold aria-[current]:decoration-double"
        >
          {words}
        </Link>
      ))}
    </nav>
  );
}
