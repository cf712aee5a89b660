import { BarsTable } from "@/components/ui/bars/bars-table";
import { stressWords } from "@/lib/client/fit/turning";
import { formatNumber, formatCount } from "@/lib/format/numbers";

const range = ([from, to]: readonly [number, number], decimals = 0) => {
  const [low, high] = [formatNumber(from, { decimals }), formatNumber(to, { decimals })];
  return { words: low === high ? low : `${low} to ${high}` };
};

/** What prints of common materials are like: ranges with their sources, to compare with and never to pass by. */
export function MaterialsTable() {
  return (
    <div className="grid gap-2">
      <BarsTable
        caption="Ranges of printed materials"
        showCaption
        columns={[
          { key: "name", head: "Material" },
          { key: "density", head: "Density", unit: "g/cm³" },
          { key: "along", head: "Strength along layers", unit: "MPa" },
          { key: "across", head: "Across layers", unit: "MPa" },
          { key: "softens", head: "Softens", unit: "°C" },
        ]}
        rows={stressWords.materials.map((material) => ({
          key: material.name,
          cells: {
            name: { words: material.name },
            density: range(material.densityGCm3, 2),
            along: range(material.inPlaneMpa),
            across: range(material.acrossLayersMpa),
            softens: range(material.softensC),
          },
        }))}
      />
      <p className="small-print max-w-3xl">
        {formatCount(stressWords.materials.length)} materials, from{" "}
        {stressWords.materials.map((material) => `${material.name}: ${material.source}`).join(". ")}. A stress far below
        these says nothing about a hub that slips, a layer that splits or a tip that rubs.
      </p>
    </div>
  );
}
