import type { CompareAnswer } from "@/lib/contracts/compare";
import { writeCsv, type CsvCell } from "@/lib/format/csv";

type Entry = CompareAnswer["entries"][number];
type Point = Entry["points"][number];

const head = [
  "kind",
  "comparability",
  "subject",
  "revision",
  "season",
  "round",
  "bench",
  "baseline_unit",
  "microphone_distance_mm",
  "set_speed_rpm",
  "level_dba",
  "level_u95_db",
  "level_is_upper_bound",
  "delta_t_k",
  "delta_t_u95_k",
  "power_w",
  "delta_t_per_power_k_per_w",
  "delta_t_per_power_u95_k_per_w",
  "ratio_to_baseline_percent",
  "ratio_to_baseline_u95_percent",
  "difference_to_baseline_k",
  "difference_to_baseline_u95_k",
  "level_difference_at_equal_cooling_db",
  "level_difference_at_equal_cooling_u95_db",
  "why_not_read",
] as const;

const blanks = (count: number): CsvCell[] => Array.from({ length: count }, () => null);

function pointRow(lead: readonly CsvCell[], point: Point): CsvCell[] {
  return [
    ...lead,
    point.setSpeedRpm,
    point.levelDba.value,
    point.levelDba.half95,
    point.levelDba.upperBound ? "yes" : "no",
    point.deltaTK.value,
    point.deltaTK.half95,
    point.powerW,
    point.resistanceKPerW.value,
    point.resistanceKPerW.half95,
    ...blanks(7),
  ];
}

function levelRow(lead: readonly CsvCell[], { atLevel }: Entry): CsvCell[] {
  const pair = (figure: { value: number; half95: number } | undefined): CsvCell[] =>
    figure ? [figure.value, figure.half95] : blanks(2);
  return [
    ...lead,
    null,
    atLevel.levelDba,
    null,
    atLevel.upperBound === undefined ? null : atLevel.upperBound ? "yes" : "no",
    ...pair(atLevel.deltaTK),
    ...blanks(3),
    ...pair(atLevel.ratioPercent),
    ...pair(atLevel.differenceK),
    ...pair(atLevel.coolingDb),
    atLevel.why ?? null,
  ];
}

/**
 * A comparison as CSV: a row a set speed of each entry and of its session's baseline, and a row an entry for what is
 * read off at the level. Units stand in the heads; half-widths (u95) are 95 % coverage. Without one axis there are no
 * rows of set speeds.
 */
export function compareCsv(answer: CompareAnswer): string {
  const seen = new Set<string>();
  const rows = answer.entries.flatMap((entry) => {
    const of = [entry.seasonTitle, entry.roundNumber, entry.bench, entry.baselineUnit, entry.distanceMm];
    const lead = (kind: string, subject: string, letter: string): CsvCell[] => [
      kind,
      answer.comparability,
      subject,
      letter,
      ...of,
    ];
    const baselineRows = seen.has(entry.sessionId)
      ? []
      : entry.baselinePoints.map((point) => pointRow(lead("set speed", "baseline", ""), point));
    seen.add(entry.sessionId);
    return [
      ...baselineRows,
      ...entry.points.map((point) => pointRow(lead("set speed", entry.name, entry.letter), point)),
      levelRow(lead("equal noise", entry.name, entry.letter), entry),
    ];
  });
  return writeCsv(head, rows);
}
