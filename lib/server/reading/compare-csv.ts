import type { CompareAnswer } from "@/lib/contracts/compare";
import { writeCsv, type CsvCell } from "@/lib/format/csv";

type Entry = CompareAnswer["entries"][number];
type Point = Entry["points"][number];
type Contrast = NonNullable<Entry["atLevel"]["ratioPercent"]>;

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
  "against",
  "quantity",
  "unit",
  "difference",
  "difference_u95",
  "tie",
  "p_two_sided",
] as const;
const figureCount = 16;
const differenceCount = 7;

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
    ...blanks(7 + differenceCount),
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
    ...blanks(differenceCount),
  ];
}

const ratioWords = "ΔT/P at equal noise, of each session's own baseline's";
const coolingWords = "ΔT at equal noise";
const levelWords = "level at equal ΔT";

/** One difference with its interval, and whether it is one that the data can't tell from none. */
function differenceRow(
  lead: readonly CsvCell[],
  { against, levelDba }: { against: string; levelDba: number | null },
  { quantity, unit, figure }: { quantity: string; unit: string; figure: Contrast },
): CsvCell[] {
  const figures = [null, levelDba, ...blanks(figureCount - 2)];
  const { value, half95, tie, p } = figure;
  return [...lead, ...figures, against, quantity, unit, value, half95, tie ? "yes" : "no", p];
}

type Named = { quantity: string; unit: string; figure: Contrast | undefined };

const known = (list: readonly Named[]): { quantity: string; unit: string; figure: Contrast }[] =>
  list.flatMap(({ figure, ...words }) => (figure ? [{ ...words, figure }] : []));

/** An entry less the baseline of its session: a ratio's difference is from 100 %. */
function againstBaseline({ atLevel }: Entry): { quantity: string; unit: string; figure: Contrast }[] {
  const { ratioPercent: ratio } = atLevel;
  return known([
    { quantity: ratioWords, unit: "%", figure: ratio && { ...ratio, value: ratio.value - 100 } },
    { quantity: coolingWords, unit: "K", figure: atLevel.differenceK },
    { quantity: levelWords, unit: "dB", figure: atLevel.coolingDb },
  ]);
}

/** Rows of what one entry less another is. */
function pairRows(answer: CompareAnswer, leadOf: (entry: Entry, kind: string) => CsvCell[]): CsvCell[][] {
  return answer.pairs.flatMap((pair) => {
    const a = answer.entries.find((entry) => entry.entryId === pair.a);
    const b = answer.entries.find((entry) => entry.entryId === pair.b);
    if (!a || !b) return [];
    const against = `${b.name} ${b.letter} (${b.seasonTitle})`;
    const levelDba = a.atLevel.levelDba === b.atLevel.levelDba ? a.atLevel.levelDba : null;
    return known([
      { quantity: ratioWords, unit: "percentage points", figure: pair.percent },
      { quantity: coolingWords, unit: "K", figure: pair.deltaTK },
      { quantity: levelWords, unit: "dB", figure: pair.coolingDb },
    ]).map((named) => differenceRow(leadOf(a, "difference"), { against, levelDba }, named));
  });
}

/**
 * A comparison as CSV: a row a set speed of each entry and of its session's baseline, a row an entry for what is read
 * off at the level, and a row a difference: of each entry from its session's baseline and from each other entry, with
 * its interval and whether it is a tie. Units stand in the heads or beside; half-widths (u95) are 95 % coverage. Without
 * one axis there are no rows of set speeds, and only differences of ratios.
 */
export function compareCsv(answer: CompareAnswer): string {
  const leadOf = (entry: Entry, kind: string, subject = entry.name, letter = entry.letter): CsvCell[] => {
    const of = [entry.seasonTitle, entry.roundNumber, entry.bench, entry.baselineUnit, entry.distanceMm];
    return [kind, answer.comparability, subject, letter, ...of];
  };
  const seen = new Set<string>();
  const rows = answer.entries.flatMap((entry) => {
    const baselineRows = seen.has(entry.sessionId)
      ? []
      : entry.baselinePoints.map((point) => pointRow(leadOf(entry, "set speed", "baseline", ""), point));
    seen.add(entry.sessionId);
    const { levelDba } = entry.atLevel;
    return [
      ...baselineRows,
      ...entry.points.map((point) => pointRow(leadOf(entry, "set speed"), point)),
      levelRow(leadOf(entry, "equal noise"), entry),
      ...againstBaseline(entry).map((named) =>
        differenceRow(leadOf(entry, "difference"), { against: "baseline", levelDba }, named),
      ),
    ];
  });
  return writeCsv(head, [...rows, ...pairRows(answer, leadOf)]);
}
