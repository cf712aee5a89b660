import type { Handle } from "../client/connect";
import type { BreakKind } from "./control";

export interface BenchControlRow {
  bench: string;
  sessions: {
    id: string;
    number: number;
    purpose: "round" | "qualification" | "bridge";
    serial: string;
    beganAt: Date;
    endedAt: Date | null;
    held: number;
    out: boolean;
  }[];
  changes: { fromAt: Date; kind: BreakKind; reason: string; serial: string | null; byPerson: string }[];
}

/** Sessions a page lists. */
const sessionsMost = 60;

/** A bench version's newest sessions and its documented changes; undefined when there is no such version. */
export async function benchControl(
  db: Handle,
  { benchVersionId }: { benchVersionId: string },
): Promise<BenchControlRow | undefined> {
  const head = await db("bench_version as v")
    .join("bench as b", "b.id", "v.bench_id")
    .where("v.id", benchVersionId)
    .first<{ bench: string } | undefined>(db.raw("b.name || ', version ' || v.number as bench"));
  if (!head) return undefined;
  const { rows: sessions }: { rows: BenchControlRow["sessions"] } = await db.raw(
    `select s.id, s.number, s.purpose, u.serial, s.began_at as "beganAt", s.ended_at as "endedAt",
       (select count(*)::int from session_hold h where h.session_id = s.id and h.lifted_at is null) as held,
       exists (select 1 from baseline_check c where c.session_id = s.id and c.rule_broken is not null) as out
     from session s join baseline_unit u on u.id = s.baseline_unit_id
     where s.bench_version_id = :benchVersionId order by s.began_at desc, s.id limit :sessionsMost`,
    { benchVersionId, sessionsMost },
  );
  const changes = await db("control_break as k")
    .leftJoin("baseline_unit as u", "u.id", "k.baseline_unit_id")
    .where("k.bench_version_id", benchVersionId)
    .orderBy([{ column: "k.from_at", order: "desc" }])
    .select<BenchControlRow["changes"]>({
      fromAt: "k.from_at",
      kind: "k.kind",
      reason: "k.reason",
      serial: "u.serial",
      byPerson: "k.by_person",
    });
  return { ...head, sessions, changes };
}
