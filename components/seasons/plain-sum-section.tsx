import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import type { Standing } from "@/lib/contracts/seasons";
import { formatRank } from "@/lib/format/ranks";
import { countWords, listWords } from "@/lib/format/words";

/** What the naive rule ΔT + L would make of the same readings; absent where there is nothing to set against. */
export function PlainSumSection({ standing, path }: { standing: Standing | null; path: string }) {
  const changes = standing?.plainSum;
  if (!standing || !changes) return null;
  const first = listWords(changes.firstAfter);
  const same = listWords(changes.firstBefore) === first;
  return (
    <Section id="plain-sum" title="What the plain sum would change" note="ΔT + L instead of the season’s rule">
      <p>
        Of {countWords(changes.both, "entry", "entries")} that both rules rank, {changes.moved} would stand elsewhere.{" "}
        {same ? `${first} would stay first.` : `First would be ${first} instead of ${listWords(changes.firstBefore)}.`}
        {changes.onlyPlainSum > 0
          ? ` The plain sum also ranks ${countWords(changes.onlyPlainSum, "entry", "entries")} that did not reach every declared level.`
          : ""}{" "}
        It adds kelvin to decibels: that 1 K is worth 1 dB is an accident of units.
      </p>
      {changes.movers.length > 0 ? (
        <div className="mt-3 max-w-2xl">
          <BarsTable
            caption="Entries that the plain sum would move the furthest"
            columns={[
              { key: "name", head: "Moves the furthest" },
              { key: "from", head: "By the season’s rule", short: true },
              { key: "to", head: "By the plain sum", short: true },
            ]}
            rows={changes.movers.map((each) => ({
              key: each.entryId,
              cells: {
                name: { words: each.name },
                from: { words: formatRank(each.from) },
                to: { words: formatRank(each.to) },
              },
            }))}
          />
        </div>
      ) : null}
      {standing.rule.kind === "plain-sum" ? null : (
        <p className="mt-3">
          <Link href={`${path}?rule=plain-sum`}>The whole standing under the plain sum</Link>
        </p>
      )}
    </Section>
  );
}
