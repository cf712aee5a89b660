export { BarsTable, type BarsTableProps } from "@/components/ui/bars/bars-table";
export type { BarsCell, BarsColumn, BarsRow, Figure } from "@/components/ui/bars/bars-model";
