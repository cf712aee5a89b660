import { randomBytes, randomUUID } from "node:crypto";
import type { Knex } from "knex";
import { afterAll, beforeAll, describe, expect, inject, it } from "vitest";
import { connect } from "@/db/client/connect";
import { askedRecording } from "@/lib/contracts/bench-recordings";
import { benchSession, sessionList } from "@/lib/contracts/bench-session";
import { fanWav, fullScaleDb } from "../factories/recordings";
import { signedOut, signInAs, type Session } from "../setup/session";
import { begin, outcome, sendByTus } from "../setup/uploading";

let owner: Knex;
let strangers: Record<string, Session>;

beforeAll(async () => {
  owner = connect(inject("server").urls.owner);
  strangers = { signedOut: signedOut(), member: await signInAs("member"), designer: await signInAs("designer") };
});
afterAll(() => owner.destroy());

/** What somebody is told, without what differs from request to request. */
async function told(who: Session, path: string, asked: string) {
  const answer = await who.fetch(path);
  const text = (await answer.text()).replaceAll(asked, "…");
  return { status: answer.status, text: text.replace(/"requestId":"[^"]*"/, "") };
}

describe("a file of a revision that nobody has published", () => {
  const secret = `kept-back-${randomBytes(5).toString("hex")}.txt`;
  let attached: { id: string; slug: string; revisionId: string };

  // A next revision of a design that has a public sheet, whose owner isn't the designer who asks.
  beforeAll(async () => {
    const { rows } = await owner.raw(
      `select p.design_id, min(d.slug) as slug from published_entry p join design d on d.id = p.design_id
        where not exists (select 1 from withdrawal w where w.entry_id = p.entry_id)
          and not exists (select 1 from design_owner o join person q on q.id = o.person_id
                           where o.design_id = d.id and q.email = 'designer@alder.example')
        group by p.design_id order by p.design_id limit 1`,
    );
    const { design_id, slug } = rows[0];
    const [revision] = await owner("revision").insert({ design_id, letter: "Z", licence: "CC-BY-4.0" }).returning("id");
    const sha256 = randomBytes(32).toString("hex");
    const [file] = await owner("file")
      .insert({ sha256, bytes: 3, kind: "text", state: "read", storage_key: `content/none/${sha256}` })
      .returning("id");
    const [row] = await owner("attachment")
      .insert({ revision_id: revision.id, file_id: file.id, role: "print_profile", ordinal: 91, name: secret })
      .returning("id");
    attached = { id: row.id, slug, revisionId: revision.id };
  });
  afterAll(async () => {
    await owner("attachment").where({ id: attached.id }).delete();
    await owner("revision").where({ id: attached.revisionId }).delete();
  });

  it("is told of to those who don't own it as one that never was, also under the design's public sheet", async () => {
    const never = randomUUID();
    for (const [name, who] of Object.entries(strangers)) {
      const wanted = await told(who, `/api/v1/files/${never}`, never);
      expect(wanted.status, name).toBe(404);
      expect(await told(who, `/api/v1/files/${attached.id}`, attached.id), name).toEqual(wanted);
      for (const path of [`/designs/${attached.slug}`, `/api/v1/sheets/${attached.slug}`]) {
        const page = await told(who, path, "…");
        expect(page.status, path).toBe(200);
        for (const word of [attached.id, attached.revisionId, secret]) expect(page.text, path).not.toContain(word);
      }
    }
    for (const path of [`/designs/${attached.slug}/z`, `/api/v1/sheets/${attached.slug}/picture.png?letter=Z`])
      expect((await signedOut().fetch(path)).status, path).not.toBe(200);
    expect((await strangers.member?.send("DELETE", `/api/v1/files/${attached.id}`))?.status).toBe(404);
  });
});

describe("a recording of an open session", () => {
  it("is nobody's but the bench's: by its own id, its upload's, as a file or by its session's list", async () => {
    const operator = await signInAs("operator");
    const list = sessionList.parse(await (await operator.fetch("/api/v1/bench/sessions?open=true")).json());
    const sessionId = list.items[0]?.id ?? "";
    const session = benchSession.parse(await (await operator.fetch(`/api/v1/bench/sessions/${sessionId}`)).json());
    const bytes = fanWav({ seed: Math.floor(Math.random() * 1e9), seconds: 2 });
    const file = { purpose: "recording", subjectId: sessionId, name: "run.wav", bytes: bytes.length } as const;
    const { uploadId, address } = await begin(operator, file);
    await sendByTus(operator, { address, bytes });
    await outcome(operator, uploadId);
    const asked = await operator.send("POST", `/api/v1/bench/sessions/${sessionId}/recordings`, {
      ...{ purpose: "run", uploadId, calibration: { fullScaleDb } },
      runId: session.runs.find((run) => run.state !== "discarded")?.id,
      positionId: session.positions[0]?.id,
    });
    expect(asked.status, await asked.clone().text()).toBe(202);
    const { recordingId } = askedRecording.parse(await asked.json());
    expect((await operator.fetch(`/api/v1/bench/recordings/${recordingId}`)).status).toBe(200);

    const places: ((id: string) => string)[] = [
      (id) => `/api/v1/bench/recordings/${id}`,
      (id) => `/api/v1/bench/recordings/${id}/file`,
      (id) => `/api/v1/files/${id}`,
      (id) => `/api/v1/uploads/${id}`,
      (id) => `/api/v1/bench/sessions/${id}/recordings`,
      (id) => `/api/v1/bench/sessions/${id}`,
    ];
    for (const [name, who] of Object.entries(strangers)) {
      for (const place of places) {
        const never = randomUUID();
        const wanted = await told(who, place(never), never);
        expect([401, 403, 404], place(never)).toContain(wanted.status);
        for (const id of [recordingId, uploadId, sessionId])
          expect(await told(who, place(id), id), `${name} ${place(id)}`).toEqual(wanted);
      }
    }
  });
});

describe("a season that was not opened", () => {
  const slug = `kept-back-${randomBytes(4).toString("hex")}`;
  const title = `Kept back ${slug.slice(-8)}`;
  let id: string;

  beforeAll(async () => {
    const known = await owner("season").orderBy("number", "desc").first();
    const { protocol_version_id, scoring_rule_version_id, levels_dba, headline_dba } = known;
    const [season] = await owner("season")
      .insert({
        ...{ protocol_version_id, scoring_rule_version_id, levels_dba, headline_dba },
        ...{ slug, title, number: known.number + 1000 },
      })
      .returning("id");
    id = season.id;
  });
  afterAll(() => owner("season").where({ id }).delete());

  it("has no page, kit, drawing, solid or line in a list for those who aren't its hosts", async () => {
    const frames = await owner("frame").select("key");
    const own = [
      ...["", "/kit", "/rounds/1"].flatMap((rest) => [`/seasons/${slug}${rest}`, `/api/v1/seasons/${slug}${rest}`]),
      `/api/v1/seasons/${slug}/kit/keep-outs.stl`,
      ...frames.flatMap(({ key }: { key: string }) =>
        ["svg", "pdf"].map((kind) => `/api/v1/seasons/${slug}/kit/frames/${key}/drawing.${kind}`),
      ),
    ];
    const lists = [
      "/",
      "/seasons",
      "/designs",
      `/designs?season=${slug}`,
      "/api/v1/seasons",
      "/api/v1/rounds",
      "/traits",
    ];
    for (const [name, who] of Object.entries(strangers)) {
      for (const path of own) expect((await who.fetch(path)).status, `${name} ${path}`).toBe(404);
      for (const path of lists) expect((await told(who, path, "…")).text, `${name} ${path}`).not.toContain(title);
    }
  });
});
