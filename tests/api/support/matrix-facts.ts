import type { Knex } from "knex";

/** Ids and addresses of the demo that paths of the matrix are made of. */
export interface MatrixFacts {
  memberId: string;
  /** A design of the demo's designer. */
  ownedDesignId: string;
  ownedDesignSlug: string;
  publishedDesignSlug: string;
  publishedEntryId: string;
  seasonSlug: string;
  /** Of the bench of that season. */
  keepOutId: string;
  benchId: string;
  benchVersionId: string;
  roundInReviewId: string;
  entryInReviewId: string;
  roundInWorkId: string;
  /** The session of the round in review, and that of the round in work where there is one. */
  sessionId: string;
  closedSessionId: string;
  /** Of the session that is open. */
  openRunId: string;
  openSessionId: string;
  /** Of a closed session whose round is published. */
  closedReadingId: string;
  entryOnBenchId: string;
  specimenOnBenchId: string;
}

const owned = `from design d join design_owner o on o.design_id = d.id join person p on p.id = o.person_id
  where p.email = 'designer@alder.example' and o.until_at is null order by d.slug limit 1`;

const questions: Record<keyof MatrixFacts, string> = {
  memberId: `select id as value from person where email = 'member@alder.example'`,
  ownedDesignId: `select d.id as value ${owned}`,
  ownedDesignSlug: `select d.slug as value ${owned}`,
  publishedDesignSlug: `select d.slug as value from published_entry e join design d on d.id = e.design_id order by d.slug limit 1`,
  publishedEntryId: `select entry_id as value from published_entry order by entry_id limit 1`,
  seasonSlug: `select slug as value from season order by slug limit 1`,
  keepOutId: `select k.id as value from keep_out k join season_bench b on b.bench_version_id = k.bench_version_id
    join season s on s.id = b.season_id order by s.slug, k.name limit 1`,
  benchId: `select id as value from bench limit 1`,
  benchVersionId: `select bench_version_id as value from season_bench order by bench_version_id limit 1`,
  roundInReviewId: `select id as value from round where state = 'in_review' limit 1`,
  entryInReviewId: `select re.entry_id as value from round_entry re join round n on n.id = re.round_id
    where n.state = 'in_review' and re.taken_out_at is null order by re.entry_id limit 1`,
  roundInWorkId: `select id as value from round where state = 'measuring' limit 1`,
  sessionId: `select id as value from session order by began_at desc limit 1`,
  closedSessionId: `select id as value from session where ended_at is not null order by began_at limit 1`,
  openRunId: `select r.id as value from run r join session s on s.id = r.session_id where s.ended_at is null order by r.id limit 1`,
  openSessionId: `select id as value from session where ended_at is null limit 1`,
  closedReadingId: `select r.id as value from reading r join session s on s.id = r.session_id join round n on n.id = s.round_id
    where n.state = 'published' and r.run_id is not null order by r.id limit 1`,
  entryOnBenchId: `select id as value from entry where state = 'on_the_bench' order by id limit 1`,
  specimenOnBenchId: `select r.specimen_id as value from run r join entry e on e.id = r.entry_id
    where e.state = 'on_the_bench' order by r.id limit 1`,
};

/** Looks them up as the schema's owner. One that the demo lacks throws when a row of the matrix asks for it. */
export async function matrixFacts(owner: Knex): Promise<MatrixFacts> {
  const found = new Map<string, string>();
  for (const [name, sql] of Object.entries(questions)) {
    const result: { rows: { value: string }[] } = await owner.raw(sql);
    const value = result.rows[0]?.value;
    if (value !== undefined) found.set(name, value);
  }
  const facts = Object.fromEntries(Object.keys(questions).map((name) => [name, ""]));
  for (const name of Object.keys(questions)) {
    Object.defineProperty(facts, name, {
      get: () => {
        const value = found.get(name);
        if (value === undefined) throw new Error(`The demo has no ${name}.`);
        return value;
      },
    });
  }
  return facts as unknown as MatrixFacts;
}
