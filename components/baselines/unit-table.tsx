import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BaselineUnit } from "@/lib/contracts/baselines";
import { formatDate } from "@/lib/format/dates";

/** The copies of a reference fan: since when each serves, and when and why it was retired. */
export function UnitTable({ name, units }: { name: string; units: readonly BaselineUnit[] }) {
  return (
    <BarsTable
      caption={`Units of ${name}`}
      phone="fold"
      columns={[
        { key: "serial", head: "Unit", tone: "baseline" },
        { key: "from", head: "In service since" },
        { key: "retired", head: "Retired" },
        { key: "why", head: "Why" },
      ]}
      rows={units.map((unit) => ({
        key: unit.serial,
        cells: {
          serial: { words: unit.serial },
          from: { words: formatDate(unit.inServiceFrom) },
          retired: { words: unit.retiredAt ? formatDate(unit.retiredAt) : "in service" },
          why: { words: unit.retiredReason ?? "–" },
        },
      }))}
    />
  );
}
