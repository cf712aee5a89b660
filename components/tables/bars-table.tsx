export { BarsTable, type BarsTableProps } from "../ui/bars/bars-table";
export type { BarsCell, BarsColumn, BarsRow, Figure } from "../ui/bars/bars-model";
