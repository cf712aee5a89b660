import { Facts, type Fact } from "@/components/ui/facts";
import { Missing } from "@/components/ui/missing";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import type { ModelFile, ModelMeasured } from "@/lib/client/fit/messages";
import { formatBytes } from "@/lib/format/bytes";
import { formatCount, formatNumber } from "@/lib/format/numbers";

const formats = { "stl-binary": "STL, binary", "stl-ascii": "STL, ASCII", "3mf": "3MF", step: "STEP" } as const;
const placeWords = { open: "open", misoriented: "misoriented", "non-manifold": "crowded" } as const;
const PLACES_SHOWN = 5;

const point = (at: readonly number[]) => at.map((value) => formatNumber(value, { decimals: 1 })).join(", ");

function facts(model: ModelFile, measured: ModelMeasured): Fact[] {
  const { min, max } = measured.boundsMm;
  const sides = max.map((value, axis) => value - (min[axis] ?? 0));
  const unknown = <Missing why="the mesh isn’t closed, so what it encloses can’t be known" />;
  return [
    { label: "File", value: `${formats[model.format]}, ${formatBytes(model.bytes)}` },
    { label: "Triangles", value: formatCount(measured.triangles) },
    { label: "Shells", value: formatCount(measured.shells) },
    { label: "Closed", value: measured.watertight ? "yes" : "no" },
    { label: "Open edges", value: formatCount(measured.openEdges) },
    { label: "Misoriented edges", value: formatCount(measured.misorientedEdges) },
    { label: "Size", value: `${sides.map((side) => formatNumber(side, { decimals: 1 })).join(" × ")} mm` },
    {
      label: "Volume",
      value:
        measured.volumeMm3 === null
          ? unknown
          : `${formatNumber(measured.volumeMm3 / 1000, { decimals: 2 })} cm³${measured.overlap ? ", of the union" : ""}`,
    },
    { label: "Area", value: `${formatNumber(measured.areaMm2 / 100, { decimals: 1 })} cm²` },
  ];
}

/** Whether the mesh is one that can be measured, and where it isn't. */
export function ValiditySection({ model, measured }: { model: ModelFile; measured: ModelMeasured }) {
  const warnings = [...model.warnings, ...measured.warnings];
  const places = measured.faults.slice(0, PLACES_SHOWN);
  return (
    <Section id="mesh" title="The mesh" className="grid gap-4">
      <Facts flow="strip" facts={facts(model, measured)} />
      {warnings.length > 0 ? (
        <Notice title={`${warnings.length === 1 ? "One thing" : `${warnings.length} things`} to know about the file`}>
          <ul className="mt-1 list-[square] space-y-1 pl-5">
            {warnings.map((warning, index) => (
              <li key={index}>{warning.message}</li>
            ))}
          </ul>
        </Notice>
      ) : (
        <p>Nothing odd was found in the file.</p>
      )}
      {places.length > 0 ? (
        <div>
          <p className="field-label">Where, in the file’s coordinates in mm</p>
          <ul className="figures list-none">
            {places.map((place, index) => (
              <li key={index}>
                {placeWords[place.kind]} edge at {point(place.pointMm)}
              </li>
            ))}
          </ul>
          {measured.faults.length > PLACES_SHOWN ? (
            <p className="small-print">and at {measured.faults.length - PLACES_SHOWN} more places.</p>
          ) : null}
        </div>
      ) : null}
    </Section>
  );
}
