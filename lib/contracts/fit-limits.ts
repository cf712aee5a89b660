/** A frame of the bench, as its preset says. Lengths in mm. */
export interface FitFrame {
  /** Size by depth, such as "120x25". */
  readonly key: string;
  readonly sizeMm: number;
  readonly depthMm: number;
  readonly boreMm: number;
  readonly holeSpacingMm: number;
  readonly holeMm: number;
  /** Taken off every clearance. */
  readonly toleranceMm: number;
}

/** A box near the cooler that a fan must stay clear of, in cooler coordinates, mm. */
export interface FitKeepOut {
  readonly name: string;
  readonly minMm: readonly [number, number, number];
  readonly maxMm: readonly [number, number, number];
}

/** A keep-out solid that is fetched when a model is compared with it. */
export interface FitMeshKeepOut {
  readonly name: string;
  readonly address: string;
}

/** What a season allows, and what stands around its bench's cooler. */
export interface FitSeason {
  readonly slug: string;
  readonly title: string;
  readonly frameKeys: readonly string[];
  /** Null: no limit. */
  readonly totalDepthMaxMm: number | null;
  readonly inletStackMaxMm: number | null;
  /** The bench that the season uses now, such as "alder, version 2"; null before one is named. */
  readonly benchName: string | null;
  readonly keepOuts: readonly FitKeepOut[];
  /** Keep-out solids that are meshes, each with the address of its STL in cooler coordinates. */
  readonly meshKeepOuts: readonly FitMeshKeepOut[];
}

/** All that a model can be compared with, the newest season first. */
export interface FitLimits {
  readonly frames: readonly FitFrame[];
  readonly seasons: readonly FitSeason[];
}
