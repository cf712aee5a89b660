import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsRow } from "@/components/ui/bars/bars-model";
import type { BudgetLine } from "@/lib/contracts/publication";
import { formatNumber } from "@/lib/format/numbers";

const quantities = { level: "Level", delta_t: "ΔT", ratio: "Ratio" } as const;
const kinds = {
  own_run: "run to run",
  own_mount: "mount to mount",
  shared_offset: "shared offset",
  shared_gain: "shared gain",
  bridge: "bridge between baselines",
} as const;
const owners = { entry: "this design", baseline: "the baseline", session: "the whole session" } as const;
const cancelling = {
  fully: "fully: both share it",
  partly: "partly: both share it",
  no: "no",
} as const;

function types(line: BudgetLine): string {
  const found = [...new Set(line.parts.map((part) => part.evaluation))].sort();
  return found.length > 0 ? found.join(" + ") : "A";
}

function budgetRow(line: BudgetLine, index: number, decimals: number): BarsRow {
  return {
    key: `${line.quantity}-${line.kind}-${line.of}-${index}`,
    tone: line.of === "baseline" ? "baseline" : undefined,
    cells: {
      part: { words: `${quantities[line.quantity]}, ${kinds[line.kind]}, ${owners[line.of]}` },
      type: { words: types(line) },
      u: { figure: { value: line.u, decimals } },
      share: { figure: { value: 100 * line.share, decimals: 1 } },
      dof:
        line.dof === null
          ? { words: <span aria-label="infinite: taken as known">∞</span> }
          : { figure: { value: line.dof, decimals: 0 } },
      cancels: { words: cancelling[line.cancels] },
      source: {
        words:
          line.parts.length === 0
            ? "spread of the readings"
            : line.parts
                .map(({ name, u, source }) => `${name} (${formatNumber(u, { decimals: 3 })}; ${source})`)
                .join("; "),
      },
    },
  };
}

export type BudgetTableProps = {
  caption: string;
  /** Of the figure; "" for a ratio. */
  unit: string;
  lines: readonly BudgetLine[];
  decimals?: number;
};

/** A figure's uncertainty line by line, the largest first. */
export function BudgetTable({ caption, unit, lines, decimals = 3 }: BudgetTableProps) {
  return (
    <BarsTable
      caption={caption}
      phone="fold"
      columns={[
        { key: "part", head: "Part" },
        { key: "type", head: "Type" },
        { key: "u", head: "Size", ...(unit && { unit }) },
        { key: "share", head: "Share of u²", unit: "%" },
        { key: "dof", head: "Degrees of freedom" },
        { key: "cancels", head: "Cancels" },
        { key: "source", head: "Source" },
      ]}
      rows={lines.map((line, index) => budgetRow(line, index, decimals))}
    />
  );
}
