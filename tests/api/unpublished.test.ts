import { randomUUID } from "node:crypto";
import { parse } from "csv-parse/sync";
import type { Knex } from "knex";
import { afterAll, beforeAll, describe, expect, inject, it } from "vitest";
import { connect } from "@/db/client/connect";
import { signedOut, signInAs, type Session } from "../setup/session";

/** An entry that the world doesn't know: in work, or measured and not published. */
interface Hidden {
  entryId: string;
  revisionId: string;
  slug: string;
  letter: string;
  name: string;
  seasonSlug: string;
  /** No entry of its design has ever been published. */
  isNew: boolean;
}

let owner: Knex;
let people: Record<string, Session>;
let hidden: Hidden[];
/** Words that no public answer may hold: ids of what is hidden, and names and slugs of designs that are new. */
let secrets: string[];
let publicCount: number;

beforeAll(async () => {
  owner = connect(inject("server").urls.owner);
  people = {
    signedOut: signedOut(),
    member: await signInAs("member"),
    designer: await signInAs("designer"),
    operator: await signInAs("operator"),
  };
  hidden = (
    await owner.raw(`
      select e.id as "entryId", r.id as "revisionId", d.slug, r.letter, d.name, s.slug as "seasonSlug",
             not exists (select 1 from published_entry p where p.design_id = d.id) as "isNew"
        from entry e join revision r on r.id = e.revision_id join design d on d.id = r.design_id
        join season s on s.id = e.season_id
       where not e.ever_published order by d.slug, r.letter`)
  ).rows;
  expect(hidden.length).toBeGreaterThan(5);
  const { rows }: { rows: { id: string }[] } = await owner.raw(
    `select x.id::text as id from session x join round n on n.id = x.round_id where n.state <> 'published'
     union select u.id::text from run u join entry e on e.id = u.entry_id where not e.ever_published
     union select g.id::text from reading g join run u on u.id = g.run_id join entry e on e.id = u.entry_id
       where not e.ever_published`,
  );
  secrets = [
    ...hidden.flatMap(({ entryId, revisionId }) => [entryId, revisionId]),
    ...rows.map((row) => row.id),
    ...hidden.filter((each) => each.isNew).flatMap(({ slug, name }) => [`"${slug}"`, `/designs/${slug}`, `>${name}<`]),
  ];
  const [counted] = await owner("published_entry as p")
    .whereNotExists(owner("withdrawal as w").whereRaw("w.entry_id = p.entry_id"))
    .count();
  publicCount = Number(counted?.count);
});
afterAll(() => owner.destroy());

const textOf = async (who: Session, path: string) => (await who.fetch(path)).text();
const leaksIn = (text: string) => secrets.filter((secret) => text.includes(secret));

/** What is told of a thing that isn't there, without what differs from request to request. */
async function refusal(who: Session, path: string, asked: string) {
  const answer = await who.fetch(path);
  const text = (await answer.text()).replaceAll(asked, "…");
  const json = (answer.headers.get("content-type") ?? "").includes("json");
  if (!json) return { status: answer.status };
  const { requestId: _, ...body } = JSON.parse(text) as Record<string, unknown>;
  return { status: answer.status, body };
}

describe.each(["signedOut", "member", "designer", "operator"])("%s", (name) => {
  const who = () => people[name] as Session;

  it("meets nothing unpublished on any public page, feed, list or table", async () => {
    const seasons = [...new Set(hidden.map((each) => each.seasonSlug))];
    const paths = [
      ...["/", "/designs", "/designs?view=drawings", "/traits", "/seasons", "/corrections", "/corrections/feed.xml"],
      ...["/baselines", "/compare", "/fit", "/method", "/sitemap.xml", "/robots.txt"],
      ...["/api/v1/designs", "/api/v1/seasons", "/api/v1/rounds", "/api/v1/corrections", "/api/v1/traits"],
      ...["entries", "pairs", "effects", "distribution"].map((table) => `/api/v1/traits/csv?table=${table}`),
      ...seasons.flatMap((slug) => [
        `/seasons/${slug}`,
        `/seasons/${slug}/kit`,
        `/api/v1/seasons/${slug}`,
        `/api/v1/designs?season=${slug}`,
      ]),
      ...seasons.flatMap((slug) => [1, 2, 3, 4, 5, 6, 7].map((n) => `/api/v1/seasons/${slug}/rounds/${n}`)),
    ];
    for (const path of paths) expect(leaksIn(await textOf(who(), path)), path).toEqual([]);
  });

  it("finds no new design by its name, its address or its id", async () => {
    for (const { slug, name: title, entryId } of hidden.filter((each) => each.isNew)) {
      for (const q of [title, slug, entryId]) {
        const text = await textOf(who(), `/api/v1/designs?q=${encodeURIComponent(q)}`);
        expect(leaksIn(text), q).toEqual([]);
      }
    }
  });

  it("opens no sheet, reading, table or picture of one, and is told no more than of one that never was", async () => {
    const never = "never-was-such-a-fan";
    const slugs = hidden.filter((each) => each.isNew).map((each) => each.slug);
    for (const rest of ["", "/readings", "/readings.csv", "/picture.png"]) {
      const wanted = await refusal(who(), `/api/v1/sheets/${never}${rest}`, never);
      expect(wanted.status).toBe(404);
      for (const slug of slugs)
        expect(await refusal(who(), `/api/v1/sheets/${slug}${rest}`, slug), slug + rest).toEqual(wanted);
    }
    for (const slug of slugs) expect((await who().fetch(`/designs/${slug}`)).status, slug).toBe(404);
    for (const { slug, letter, entryId } of hidden.filter((each) => !each.isNew)) {
      for (const rest of ["", "/readings", "/readings.csv", "/picture.png"]) {
        expect((await who().fetch(`/api/v1/sheets/${slug}${rest}?entry=${entryId}`)).status, slug + rest).toBe(404);
      }
      const published = await owner("published_entry as p")
        .join("revision as r", "r.id", "p.revision_id")
        .join("design as d", "d.id", "r.design_id")
        .where({ "d.slug": slug, "r.letter": letter })
        .first("p.entry_id");
      if (!published) expect((await who().fetch(`/designs/${slug}/${letter.toLowerCase()}`)).status).toBe(404);
    }
  });

  it("compares none: alone it isn't there, beside others it is missing like one that never was", async () => {
    const { items } = (await (await who().fetch("/api/v1/designs")).json()) as { items: { entryId: string }[] };
    const known = items[0]?.entryId ?? "";
    const never = randomUUID();
    const beside = async (token: string) =>
      (await textOf(who(), `/api/v1/compare?entries=${known},${token}`)).replaceAll(token, "…");
    const wanted = await beside(never);
    for (const { entryId, slug, letter, seasonSlug } of hidden) {
      for (const token of [entryId, `${slug}.${letter.toLowerCase()}.${seasonSlug}`]) {
        expect((await who().fetch(`/api/v1/compare?entries=${token}`)).status, token).toBe(404);
        expect((await who().fetch(`/api/v1/compare/csv?entries=${token}`)).status, token).toBe(404);
        expect(await beside(token), token).toBe(wanted);
      }
    }
  });
});

describe("counts", () => {
  it("of the index and of every facet are those of what is public", async () => {
    const page = (await (await signedOut().fetch("/api/v1/designs")).json()) as Page;
    expect(page.total).toBe(publicCount);
    for (const facet of ["season", "frame", "stages", "rotation", "hand"]) {
      const sum = (page.facets[facet] ?? []).reduce((total, { count }) => total + count, 0);
      expect(sum, facet).toBe(publicCount);
    }
    const reached = await owner("published_entry").whereNotNull("equal_noise_ratio").count();
    const bars = page.histograms.ratio ?? [];
    expect(bars.reduce((total, bar) => total + bar.count, 0)).toBe(Number(reached[0]?.count));
  });

  it("of the study are those of what is public", async () => {
    const rows = parse<{ entry_id: string }>(await textOf(signedOut(), "/api/v1/traits/csv?table=entries"), {
      columns: true,
    });
    expect(rows).toHaveLength(publicCount);
    const { result } = (await (await signedOut().fetch("/api/v1/traits")).json()) as { result: { entries: number } };
    expect(result.entries).toBe(publicCount);
  });
});

interface Page {
  total: number;
  facets: Record<string, { value: string; count: number }[]>;
  histograms: Record<string, { count: number }[]>;
}
