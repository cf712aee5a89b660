import Link from "next/link";
import { drawingOf } from "@/components/drawing/traits-drawing-view";
import { ViewSvg } from "@/components/drawing/view-svg";
import { Value } from "@/components/ui/value";
import type { DrawnTraitsAnswer } from "@/lib/contracts/compare";
import type { IndexItem } from "@/lib/contracts/index-query";
import { entryToken } from "@/lib/domain/designs/entry-token";
import { ArrowList } from "./arrow-list";
import { columnWords, type IndexColumn } from "./columns";
import { entryName, nameWords, type Piece } from "./entry-name";
import { PickSlot } from "./pick-slot";

export type DrawingGridProps = {
  items: readonly IndexItem[];
  /** By entry id; missing where nothing is known to draw from. */
  drawings: Readonly<Record<string, DrawnTraitsAnswer>>;
  names: Readonly<Record<string, readonly Piece[] | undefined>>;
  /** The figure that stands under each drawing: the one sorted by. */
  lead: IndexColumn | undefined;
  distanceMm: number | undefined;
};

/** Room around the largest tip circle, as a share of its radius. */
const margin = 1.06;

/** The list as front views, all at one scale, each with the figure it is sorted by. Arrows go from one to the next. */
export function DrawingGrid({ items, drawings, names, lead, distanceMm }: DrawingGridProps) {
  const radius = (traits: DrawnTraitsAnswer | undefined) =>
    Math.max(0, ...(traits?.rotors ?? []).map((rotor) => (rotor.tipDiameterMm ?? 0) / 2));
  const reach = margin * Math.max(1, ...items.map((item) => radius(drawings[item.entryId])));
  return (
    <>
      <ArrowList
        label="Entries that fit"
        className="grid grid-cols-[repeat(auto-fill,minmax(9rem,1fr))] gap-x-6 gap-y-7"
      >
        {items.map((item) => (
          <li key={item.entryId} className="grid content-start gap-1.5" data-stop>
            <Thumb item={item} traits={drawings[item.entryId]} reach={reach} />
            <p className="flex items-start gap-2 leading-7">
              <PickSlot token={entryToken(item)} name={entryName(item)} />
              <Link href={`/designs/${item.slug}`} className="font-bold">
                {nameWords(item, names[item.entryId])}
              </Link>
            </p>
            <p className="figures text-sm">
              <LeadFigure item={item} lead={lead} distanceMm={distanceMm} />
            </p>
            <p className="small-print">
              {item.designers.join(", ")}
              {item.corrections > 0 ? ", corrected" : ""}
            </p>
          </li>
        ))}
      </ArrowList>
      <p className="small-print mt-4">
        Front views from declared traits, not from meshes, all at one scale. Beside each name its slot
        {lead ? `; under it: ${columnWords(lead, distanceMm)}` : ""}.
      </p>
    </>
  );
}

function Thumb({ item, traits, reach }: { item: IndexItem; traits: DrawnTraitsAnswer | undefined; reach: number }) {
  const front = traits && drawingOf(traits)?.front;
  if (!front) return <p className="small-print grid aspect-square place-items-center">not enough declared to draw</p>;
  // Its lines follow the height of its words: heavier than on a sheet, since it is small.
  const [size, bare] = [2 * reach, { dimensions: "", centres: "", words: [], textMm: reach / 4 }];
  const view = { ...front, ...bare, minX: -reach, minY: -reach, width: size, height: size };
  return <ViewSvg view={{ ...view, title: `${entryName(item)}, front` }} width="100%" />;
}

type LeadProps = Pick<DrawingGridProps, "lead" | "distanceMm"> & { item: IndexItem };

function LeadFigure({ item, lead, distanceMm }: LeadProps) {
  const cell = lead?.cell(item);
  if (!cell) return null;
  if ("words" in cell) return cell.words;
  const unit = typeof lead?.unit === "function" ? lead.unit({ distanceMm, fullSetSpeed: undefined }) : lead?.unit;
  return <Value {...cell.figure} unit={unit} />;
}
