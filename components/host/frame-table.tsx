import { BarsTable } from "@/components/ui/bars/bars-table";
import type { HostFrame } from "@/lib/contracts/frames-admin";
import { formatFrame } from "@/lib/format/frames";

const millimetres = (value: number) => ({ figure: { value, decimals: 1 } });

/** Frames with their figures and what stands on them. */
export function FrameTable({ frames }: { frames: readonly HostFrame[] }) {
  return (
    <BarsTable
      caption="Frames"
      phone="fold"
      columns={[
        { key: "name", head: "Frame", unit: "mm" },
        { key: "outer", head: "Outer", unit: "mm" },
        { key: "depth", head: "Depth", unit: "mm" },
        { key: "bore", head: "Bore", unit: "mm" },
        { key: "spacing", head: "Hole spacing", unit: "mm" },
        { key: "hole", head: "Holes", unit: "mm" },
        { key: "tolerance", head: "Tolerance", unit: "mm" },
        { key: "use", head: "In use" },
      ]}
      rows={frames.map(({ id, key, figures, frozen }) => ({
        key: id,
        cells: {
          name: { words: <span className="whitespace-nowrap">{formatFrame(key)}</span> },
          outer: millimetres(figures.outerMm),
          depth: millimetres(figures.depthMm),
          bore: millimetres(figures.boreMm),
          spacing: millimetres(figures.holeSpacingMm),
          hole: millimetres(figures.holeDiameterMm),
          tolerance: millimetres(figures.toleranceMm),
          use: { words: frozen ?? "not yet: can be changed" },
        },
      }))}
    />
  );
}
