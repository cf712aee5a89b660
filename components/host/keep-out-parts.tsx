import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Fold } from "@/components/ui/fold";
import { Missing } from "@/components/ui/missing";
import { CautionList } from "@/components/ui/notice";
import { EmptyState } from "@/components/ui/states";
import type { BenchKeepOuts } from "@/lib/contracts/keep-outs";
import { formatNumber } from "@/lib/format/numbers";
import { AddKeepOutBoxForm, DropKeepOut } from "./keep-out-forms";
import { AddKeepOutMeshForm } from "./keep-out-mesh-form";

const cautions = [
  "Measure with the heater cold and unplugged and the fan at rest.",
  "A solid that is smaller here than at the bench lets a rotor that touches it pass as fitting: a rotor that touches breaks, and its pieces fly.",
];

type Place = BenchKeepOuts["items"][number]["minMm"];
const corner = (at: Place) =>
  at
    ? { words: <span className="figures">{at.map((mm) => formatNumber(mm, { decimals: 1 })).join(", ")}</span> }
    : { figure: { value: null, why: "how far the mesh reaches was not kept" } };

/** Keep-out solids of a bench version: what there is, and adding or taking off as long as nothing stands on it. */
export function KeepOutsPart({ benchVersionId, keepOuts }: { benchVersionId: string; keepOuts: BenchKeepOuts }) {
  const { items, frozen } = keepOuts;
  return (
    <div className="grid gap-4">
      {items.length === 0 ? (
        <EmptyState title="No solid is named">
          <p>Every fan that keeps a season’s lengths fits then: name what stands around the cooler.</p>
        </EmptyState>
      ) : (
        <Solids items={items} changeable={frozen === null} />
      )}
      <p className="small-print max-w-3xl">
        In cooler coordinates: 0 is where the fan’s axis meets the mounting face; z points away from the cooler, x to
        the right and y up as one looks at the fan from its inlet side.
      </p>
      {frozen === null ? (
        <>
          <CautionList title="before you measure it" items={cautions} />
          <div>
            <Fold title="Add a box …">
              <AddKeepOutBoxForm benchVersionId={benchVersionId} />
            </Fold>
            <Fold title="Add a mesh …">
              <AddKeepOutMeshForm benchVersionId={benchVersionId} />
            </Fold>
          </div>
        </>
      ) : (
        <p className="max-w-3xl">
          {frozen} <Link href="/host/benches">Benches and protocols</Link>
        </p>
      )}
    </div>
  );
}

function Solids({ items, changeable }: { items: BenchKeepOuts["items"]; changeable: boolean }) {
  return (
    <BarsTable
      caption="Keep-out solids in cooler coordinates"
      phone="fold"
      columns={[
        { key: "name", head: "Solid" },
        { key: "shape", head: "Shape", short: true },
        { key: "min", head: "From x, y, z", unit: "mm" },
        { key: "max", head: "To x, y, z", unit: "mm" },
        { key: "note", head: "Note" },
        ...(changeable ? [{ key: "drop", head: "Change", hideHead: true }] : []),
      ]}
      rows={items.map(({ id, name, shape, note, minMm, maxMm }) => ({
        key: id,
        cells: {
          name: { words: name },
          shape: { words: shape },
          min: corner(minMm),
          max: corner(maxMm),
          note: { words: note === "" ? <Missing why="there is nothing to add" /> : note },
          drop: { words: <DropKeepOut id={id} name={name} shape={shape} /> },
        },
      }))}
    />
  );
}
