import Link from "next/link";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import type { Standing } from "@/lib/contracts/seasons";
import { formatDate } from "@/lib/format/dates";
import { formatCount, formatNumber } from "@/lib/format/numbers";
import { StandingTable } from "./standing-table";

export type StandingSectionProps = {
  standing: Standing | null;
  /** The page's address without a rule. */
  path: string;
  title: string;
  /** The unit of the declared levels. */
  unit: string;
  seasonSlug?: string;
};

/** The rules to look at it under; the current one is marked, and the address keeps it. */
function RuleChoice({ standing, path }: { standing: Standing; path: string }) {
  if (standing.rules.length < 2) return null;
  return (
    <nav aria-label="Scoring rule" className="mb-4 flex flex-wrap items-baseline gap-x-4 gap-y-1">
      <span className="text-soft">Under the rule</span>
      {standing.rules.map(({ kind, label }) => (
        <Link
          key={kind}
          href={kind === standing.seasonRule ? path : `${path}?rule=${kind}`}
          scroll={false}
          aria-current={kind === standing.rule.kind ? "true" : undefined}
          className={kind === standing.rule.kind ? "font-bold" : undefined}
        >
          {label}
          {kind === standing.seasonRule ? " (the season’s)" : ""}
        </Link>
      ))}
    </nav>
  );
}

/** A standing under a rule: the rule in words, ranks with ranges, and how the ranges were drawn. */
export function StandingSection({ standing, path, title, unit, seasonSlug }: StandingSectionProps) {
  if (!standing) {
    return (
      <Section id="standing" title={title}>
        <EmptyState title="No standing yet">It comes with the first published round.</EmptyState>
      </Section>
    );
  }
  const { rule } = standing;
  return (
    <Section id="standing" title={title} note={`as of ${formatDate(standing.asOf)}, standing ${standing.number}`}>
      <RuleChoice standing={standing} path={path} />
      <p className="mb-3">
        <strong>{rule.label}:</strong> {rule.formula}. {rule.better === "lower" ? "Lower" : "Higher"} is better.{" "}
        {rule.note}
      </p>
      <StandingTable
        standing={standing}
        caption={`${title}, ranks with their 95 % ranges under the rule ${rule.label}`}
        unit={unit}
        seasonSlug={seasonSlug}
      />
      <p className="small-print mt-3">
        Ranges hold 95 of 100 of {formatCount(standing.draws)} simulated rounds (seed {formatNumber(standing.seed)}), in
        which all entries of a session share the draw of its baseline.{" "}
        {standing.rows.some((row) => row.letters)
          ? "Entries that share a letter aren’t told apart at 5 %, adjusted for all pairs (Holm)."
          : "Where ranges overlap widely, call it a tie."}
      </p>
    </Section>
  );
}
