import { parse } from "csv-parse/sync";
import { expect, test } from "vitest";
import { compareAnswerSchema } from "@/lib/contracts/compare";
import { signedOut } from "@/tests/setup/session";

type Row = Record<string, string>;

/** Entries of one season, so that they share an axis. */
async function compared(season: string) {
  const { items } = (await (await signedOut().fetch(`/api/v1/designs?season=${season}`)).json()) as {
    items: { entryId: string }[];
  };
  const query = `entries=${items
    .slice(0, 3)
    .map((item) => item.entryId)
    .join(",")}`;
  const answer = compareAnswerSchema.parse(await (await signedOut().fetch(`/api/v1/compare?${query}`)).json());
  // The reader refuses rows whose number of cells isn't the head's (RFC 4180, 2.4).
  const rows = parse<Row>(await (await signedOut().fetch(`/api/v1/compare/csv?${query}`)).text(), { columns: true });
  return { answer, rows };
}

test("the table holds every difference of the comparison with its interval, and whether it is a tie", async () => {
  const { answer, rows } = await compared("season-2");
  expect(answer.comparability).toBe("same-axis");
  expect(answer.pairs).toHaveLength(3);
  const figures = (row: Row) => [Number(row.difference), Number(row.difference_u95), row.tie, Number(row.p_two_sided)];
  for (const [unit, key] of [
    ["percentage points", "percent"],
    ["K", "deltaTK"],
    ["dB", "coolingDb"],
  ] as const) {
    const between = rows.filter((row) => row.unit === unit && row.against !== "baseline");
    const wanted = answer.pairs.flatMap((pair) => pair[key] ?? []);
    expect(between.map(figures)).toEqual(
      wanted.map(({ value, half95, tie, p }) => [value, half95, tie ? "yes" : "no", p]),
    );
  }
  const against = rows.filter((row) => row.against === "baseline" && row.unit === "%");
  expect(against.map((row) => Number(row.difference) + 100)).toEqual(
    answer.entries.flatMap(({ atLevel }) => (atLevel.ratioPercent ? [expect.closeTo(atLevel.ratioPercent.value)] : [])),
  );
});
