import type { RowTable } from "./row-table";

/** Heights, as row numbers of a table, over which blades stand, and the zone up to half-way to the next band. */
export interface BladeBand {
  readonly fromRow: number;
  readonly toRow: number;
  readonly zoneFromRow: number;
  readonly zoneToRow: number;
}

/** Where hub, blades and ring begin and end along the radius, as radius numbers of a table. */
export interface RadialProfile {
  /** First radius of the hub: above 0 where it has a bore. */
  readonly bore: number;
  /** Last radius of the hub. */
  readonly hub: number;
  /** First radius of a ring at the blades' tips, if there is one. */
  readonly ring: number | undefined;
  /** Last radius with anything solid. */
  readonly outer: number;
}

const FULL = 0.98;
const BARE = 0.004;
const BAND_SHARE = 0.12;
/** A height at which no more radii than this show blades is bare. */
const BARE_RADII = 1;
/** A hub wider than this share of the whole is a gear's or a wheel's (common practice, no source). */
const HUB_SHARE_MAX = 0.82;
/** A closed ring may be broken this often before it counts as blades again (part-span rings, chamfers). */
const RING_SHARE = 0.85;

/** Bands of rows in which circles run through several solid pieces at many radii. */
export function bladeBands(table: RowTable): BladeBand[] {
  const rows = table.heightsMm.length;
  const counts = Array.from({ length: rows }, (_, j) => {
    let count = 0;
    for (let i = 0; i < table.radiiMm.length; i++) {
      const fill = table.fill[i * rows + j] ?? 0;
      if (fill > BARE && fill < FULL && (table.runs[i * rows + j] ?? 0) >= 2) count++;
    }
    return count;
  });
  const needed = Math.max(2, BAND_SHARE * Math.max(...counts));
  const bands: { fromRow: number; toRow: number }[] = [];
  let bareSince = true;
  for (let j = 0; j < rows; j++) {
    const count = counts[j] ?? 0;
    if (count <= BARE_RADII) bareSince = true;
    if (count < needed) continue;
    const last = bands[bands.length - 1];
    // Blades that thin out and thicken again, as past the end of a short hub, are one row; only a bare height parts two.
    if (last && !bareSince) last.toRow = j;
    else bands.push({ fromRow: j, toRow: j });
    bareSince = false;
  }
  const kept = bands.filter((band) => band.toRow > band.fromRow);
  return kept.map((band, i) => {
    const [below, above] = [kept[i - 1], kept[i + 1]];
    return {
      ...band,
      zoneFromRow: below ? Math.ceil((below.toRow + band.fromRow) / 2) : 0,
      zoneToRow: above ? Math.floor((band.toRow + above.fromRow) / 2) : rows - 1,
    };
  });
}

/**
 * What the radial build of a band may be, innermost hub first: each run of full circles with something past it may be
 * the hub, as spokes stand between a boss and the hub's own ring, and blades may pass through a ring at part span. Empty
 * where no hub is inside blades, so that the band is no rotor.
 */
export function radialProfiles(table: RowTable, band: BladeBand): RadialProfile[] {
  const { radiiMm, heightsMm, fill } = table;
  const rows = heightsMm.length;
  const most = (i: number, from: number, to: number): number => {
    let high = 0;
    for (let j = from; j <= to; j++) high = Math.max(high, fill[i * rows + j] ?? 0);
    return high;
  };
  const full = Array.from(radiiMm, (_, i) => most(i, band.zoneFromRow, band.zoneToRow) >= FULL);
  const bare = Array.from(radiiMm, (_, i) => most(i, band.fromRow, band.toRow) <= BARE);
  const outer = bare.lastIndexOf(false);
  const bore = full.indexOf(true);
  if (outer < 0 || bore < 0) return [];
  const widest = HUB_SHARE_MAX * (radiiMm[outer] ?? 0);
  return full.flatMap((is, hub) => {
    if (!is || full[hub + 1] || (radiiMm[hub] ?? 0) > widest) return [];
    // Nothing at all between blades and what stands around them: that isn't part of this rotor.
    const gap = bare.indexOf(true, hub + 1);
    const end = gap < 0 ? outer : Math.min(outer, gap - 1);
    const ring = ringFrom(full, hub, end);
    return hub >= end || (ring !== undefined && ring <= hub + 1) ? [] : [{ bore, hub, ring, outer: end }];
  });
}

/** First radius of the ring that ends a band at `outer`; undefined where there is none. */
function ringFrom(full: readonly boolean[], hub: number, outer: number): number | undefined {
  let ring: number | undefined;
  for (let i = outer; i > hub; i--) {
    const closed = full.slice(i, outer + 1).filter(Boolean).length;
    if (full[i] && closed >= RING_SHARE * (outer + 1 - i)) ring = i;
  }
  return ring;
}
