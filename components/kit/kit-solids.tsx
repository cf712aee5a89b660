import { SurroundingsView } from "@/components/drawing/fitting-drawing-view";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { buttonClass } from "@/components/ui/button-class";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import type { Kit, KitSolid } from "@/lib/contracts/kit";
import { formatNumber, minusSign } from "@/lib/format/numbers";
import { kitPath } from "./kit-frames";

const signed = (value: number) => `${value < 0 ? minusSign : ""}${formatNumber(Math.abs(value), { decimals: 1 })}`;
const corner = (at: KitSolid["minMm"]) =>
  at
    ? { words: <span className="figures">{at.map(signed).join(", ")}</span> }
    : { figure: { value: null, why: "a mesh: see its STL" } };

/** What stands around the cooler: where, and as solids to put into one's own drawing. */
export function KitSolids({ kit }: { kit: Kit }) {
  const { solids, frames, bench } = kit;
  const [frame] = frames;
  const path = kitPath(kit);
  const boxes = solids.flatMap(({ name, minMm, maxMm }) => (minMm && maxMm ? [{ name, min: minMm, max: maxMm }] : []));
  return (
    <Section
      id="keep-outs"
      title="Keep-out solids"
      note={bench ? `around the cooler of ${bench.name}, version ${bench.version}` : null}
      className="grid gap-4"
      aside={
        solids.length > 0 ? (
          <a className={buttonClass("outline", true)} download href={`${path}/keep-outs.stl`}>
            Take all solids (STL)
          </a>
        ) : null
      }
    >
      {solids.length === 0 ? (
        <EmptyState title="Nothing is in the way">
          <p>The bench names no solid that a fan must stay clear of.</p>
        </EmptyState>
      ) : (
        <>
          {frame && boxes.length > 0 ? <SurroundingsView frame={frame} solids={boxes} /> : null}
          <BarsTable
            caption="Keep-out solids in cooler coordinates"
            phone="fold"
            columns={[
              { key: "name", head: "Solid" },
              { key: "min", head: "From x, y, z", unit: "mm" },
              { key: "max", head: "To x, y, z", unit: "mm" },
              { key: "note", head: "Note" },
              { key: "file", head: "File" },
            ]}
            rows={solids.map((solid) => ({
              key: solid.id,
              cells: {
                name: { words: solid.name },
                min: corner(solid.minMm),
                max: corner(solid.maxMm),
                note: solid.note ? { words: solid.note } : { figure: { value: null, why: "there is nothing to add" } },
                file: {
                  words: (
                    <a download href={`${path}/keep-outs/${solid.id}`}>
                      {solid.name} (STL)
                    </a>
                  ),
                },
              },
            }))}
          />
          <p className="small-print max-w-3xl">
            0 is where the fan’s axis meets the cooler’s mounting face; z points away from the cooler, x to the right
            and y up as one looks at the fan from its inlet side. The STL files are in the same coordinates, in mm: put
            your fan’s mounting face on z = 0. What turns must keep clear of them by your tolerance and ours.
          </p>
        </>
      )}
    </Section>
  );
}
