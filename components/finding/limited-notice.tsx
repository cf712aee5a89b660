import { Notice } from "@/components/ui/notice";
import type { IndexQuery } from "@/lib/contracts/index-query";

/** While the search service is away the database lists: what that means for what was asked. */
export function LimitedNotice({ query }: { query: Pick<IndexQuery, "q"> }) {
  return (
    <Notice title="Limited search" live="status" className="mb-4 max-w-3xl">
      <p>
        The search service doesn’t answer just now, so this list comes straight from the database. It is complete and up
        to date.{" "}
        {query.q
          ? `“${query.q}” is looked for letter by letter in name, designer, season, inlet stack and material: an error of typing finds nothing, and nothing is marked in the list.`
          : "Words are looked for letter by letter in name, designer, season, inlet stack and material: errors of typing aren’t forgiven."}
      </p>
    </Notice>
  );
}
