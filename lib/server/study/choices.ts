import type { studyChoices } from "@/db/queries/shown/study";
import type { StudyChoices } from "@/lib/contracts/study";
import { formatFrame } from "@/lib/format/frames";
import { numberWord } from "@/lib/format/words";

type Counted = Awaited<ReturnType<typeof studyChoices>>;
type Choice = StudyChoices["frames"][number];

function tally(counted: Counted, keyOf: (row: Counted[number]) => string): Map<string, number> {
  const counts = new Map<string, number>();
  for (const row of counted) counts.set(keyOf(row), (counts.get(keyOf(row)) ?? 0) + row.count);
  return counts;
}

/** Frames, and a size as a whole where several frames share it. */
function frameChoices(counted: Counted): Choice[] {
  const keys = [...tally(counted, ({ frame }) => frame)].sort(([a], [b]) =>
    a.localeCompare(b, "en", { numeric: true }),
  );
  const classes = [...tally(counted, ({ frame }) => frame.split("x")[0] ?? frame)];
  const shared = classes.filter(([size]) => keys.filter(([key]) => key.startsWith(`${size}x`)).length > 1);
  return [
    ...shared.map(([value, count]) => ({ value, label: `${value} mm, any depth`, count })),
    ...keys.map(([value, count]) => ({ value, label: `${formatFrame(value)} mm`, count })),
  ];
}

const rotationLabels = { single: "one", co: "two, turning the same way", counter: "two, counter-rotating" } as const;

/** Seasons with public entries, newest first, and the last few of them together. */
function seasonChoices(counted: Counted): Choice[] {
  const seasons = [...new Map(counted.map((row) => [row.season, row])).values()].sort(
    (a, b) => b.seasonNumber - a.seasonNumber,
  );
  const counts = tally(counted, ({ season }) => season);
  const of = (list: typeof seasons) => list.reduce((total, { season }) => total + (counts.get(season) ?? 0), 0);
  const lasts = [1, 2, 3].filter((many) => many === 1 || many < seasons.length);
  return [
    ...lasts.map((many) => ({
      value: `last-${many}`,
      label: many === 1 ? "the last season" : `the last ${numberWord(many)} seasons`,
      count: of(seasons.slice(0, many)),
    })),
    ...seasons.map(({ season, title }) => ({ value: season, label: title, count: counts.get(season) ?? 0 })),
  ];
}

/** What the question's parts can be, with how many public entries each has. */
export function choicesFrom(counted: Counted): StudyChoices {
  const rotations = tally(counted, ({ rotation }) => rotation);
  return {
    frames: frameChoices(counted),
    rotations: (["single", "co", "counter"] as const).flatMap((value) => {
      const count = rotations.get(value);
      return count === undefined ? [] : [{ value, label: rotationLabels[value], count }];
    }),
    seasons: counted.length === 0 ? [] : seasonChoices(counted),
  };
}

/** The slugs that a question's season means; undefined for a season without public entries, which nothing fits. */
export function seasonSlugs(season: string, counted: Counted): string[] | undefined {
  if (season === "all") return [];
  const numbers = new Map(counted.map((row) => [row.season, row.seasonNumber]));
  const last = /^last-([1-3])$/.exec(season);
  if (!last) return numbers.has(season) ? [season] : undefined;
  return [...numbers]
    .sort(([, a], [, b]) => b - a)
    .slice(0, Number(last[1]))
    .map(([slug]) => slug);
}
