import { BarsTable } from "@/components/ui/bars/bars-table";
import { budgetChanges, budgetTotals, TOTALS_AT, type BenchPart } from "@/lib/domain/results/bench-budget";
import { formatNumber } from "@/lib/format/numbers";

export const quantityWords = { level_dba: "Level", delta_t_k: "ΔT" } as const;
export const partKinds = {
  own_run: "run to run",
  own_mount: "mount to mount",
  shared_offset: "shared offset",
  shared_gain: "shared gain",
} as const;

const units = { level_dba: "dB", delta_t_k: "K" } as const;

/** What a budget comes to, beside what another one came to where one is given. */
export function BudgetTotals({ parts, before }: { parts: readonly BenchPart[]; before?: readonly BenchPart[] }) {
  const rows = (["level_dba", "delta_t_k"] as const).flatMap((quantity) => {
    const now = budgetTotals(parts, quantity);
    const old = before && budgetTotals(before, quantity);
    return (["alone", "against"] as const).map((how) => ({ quantity, how, now: now?.[how], old: old?.[how] }));
  });
  const why = "no part of this quantity";
  return (
    <>
      <BarsTable
        caption="What the budget comes to for one run of one mount"
        columns={[
          { key: "of", head: "Of" },
          { key: "unit", head: "In" },
          ...(before ? [{ key: "old", head: "U before", label: "Expanded uncertainty before" }] : []),
          { key: "expanded", head: "U", label: "Expanded uncertainty" },
          { key: "u", head: "u", label: "Combined standard uncertainty" },
          { key: "dof", head: "ν", label: "Effective degrees of freedom" },
          { key: "k", head: "k" },
        ]}
        rows={rows.map(({ quantity, how, now, old }) => ({
          key: `${quantity} ${how}`,
          cells: {
            of: { words: `${quantityWords[quantity]}${how === "alone" ? "" : " against the baseline"}` },
            unit: { words: units[quantity] },
            old: { figure: { value: old?.expanded, decimals: 3, why } },
            expanded: { figure: { value: now?.expanded, decimals: 3, why } },
            u: { figure: { value: now?.u, decimals: 3, why } },
            dof: {
              figure: {
                value: now && Number.isFinite(now.dof) ? now.dof : undefined,
                decimals: 1,
                why: now ? "infinitely many" : why,
              },
            },
            k: { figure: { value: now?.k, decimals: 2, why } },
          },
        }))}
      />
      <p className="small-print mt-2">
        95 % coverage; a relative part at ΔT = {TOTALS_AT.deltaTK} K, against the baseline at a difference of{" "}
        {TOTALS_AT.differenceK} K. Against the baseline own parts count for both and the shared offset cancels. More
        mounts make own parts smaller; each published figure has its own budget.
      </p>
    </>
  );
}

/** What changed against another budget, part by part. */
export function BudgetChanges({
  before,
  after,
  since,
}: {
  before: readonly BenchPart[];
  after: readonly BenchPart[];
  since: string;
}) {
  const changes = budgetChanges(before, after);
  if (changes.length === 0) return <p>Nothing differs from {since}.</p>;
  return (
    <>
      <p className="font-bold">Against {since}:</p>
      <ul className="list-[square] pl-5">
        {changes.map(({ part, change, words }) => (
          <li key={`${part.quantity} ${part.name} ${change}`}>
            {quantityWords[part.quantity]}, {part.name}: {change} ({words})
          </li>
        ))}
      </ul>
    </>
  );
}

/** The parts of a budget, to read. */
export function PartsTable({ caption, parts }: { caption: string; parts: readonly BenchPart[] }) {
  return (
    <BarsTable
      caption={caption}
      columns={[
        { key: "name", head: "Part" },
        { key: "quantity", head: "Of" },
        { key: "u", head: "Size" },
        { key: "kind", head: "Kind" },
        { key: "type", head: "Type, distribution, ν" },
        { key: "source", head: "Source" },
      ]}
      rows={parts.map((part) => ({
        key: `${part.quantity} ${part.name}`,
        cells: {
          name: { words: part.name },
          quantity: { words: quantityWords[part.quantity] },
          u: {
            words:
              part.unit === "relative"
                ? `${formatNumber(100 * part.u, { decimals: 2 })} %`
                : `${formatNumber(part.u, { decimals: 3 })} ${part.unit}`,
          },
          kind: { words: partKinds[part.kind] },
          type: { words: `${part.evaluation}, ${part.distribution}, ${part.dof ?? "infinite"}` },
          source: { words: part.source },
        },
      }))}
    />
  );
}
