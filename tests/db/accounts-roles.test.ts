import { describe, expect, it } from "vitest";
import { changeEmail } from "./support/change-email";
import { changeHandle, chooseMail, readAccount } from "@/lib/server/accounts/account";
import { closeAccount, eraseAccount } from "@/lib/server/accounts/leave";
import { changeRole, readPeople } from "@/lib/server/accounts/people";
import { readAudit } from "@/lib/server/audit/audit";
import { ANONYMOUS } from "@/lib/domain/accounts/actor";
import { makePerson, testPassword } from "../factories/people";
import { setUpDatabase } from "../setup/database";
import { setUpLetters } from "../setup/letters";

const db = setUpDatabase();
const letters = setUpLetters();
const requestId = "test";

describe("roles", () => {
  it("are given by a host alone, from the role that the host saw, with an audit row", async () => {
    const host = await makePerson(db.owner, "host", "host");
    const member = await makePerson(db.owner, "member");
    const operator = await makePerson(db.owner, "operator", "operator");
    const change = { personId: member.personId, role: "operator", was: "member" } as const;
    await expect(changeRole(member, { ...change, role: "host" }, requestId)).rejects.toMatchObject({
      code: "forbidden",
    });
    await expect(changeRole(operator, change, requestId)).rejects.toMatchObject({ code: "forbidden" });
    await expect(changeRole(ANONYMOUS, change, requestId)).rejects.toMatchObject({ code: "not_signed_in" });
    expect(await changeRole(host, change, requestId)).toMatchObject({ role: "operator" });
    await expect(changeRole(host, { ...change, role: "host" }, requestId)).rejects.toMatchObject({ code: "moved_on" });
    const audit = await readAudit(host, { subjectKind: "person", subjectId: member.personId });
    expect(audit.items).toMatchObject([
      {
        action: "person.role",
        actorHandle: "host",
        before: { role: "member" },
        after: { role: "operator" },
        requestId,
      },
    ]);
    await expect(readAudit(operator, {})).rejects.toMatchObject({ code: "forbidden" });
    await expect(readPeople(operator, {})).rejects.toMatchObject({ code: "forbidden" });
  });

  it("leave the last host where they are, also when the last two go at once", async () => {
    const [one] = await db.owner("person").where({ role: "host" }).select("id");
    const first = { personId: String(one?.id), handle: "host", role: "host" } as const;
    const stepDown = (actor: { personId: string; handle: string; role: "host" }) =>
      changeRole(actor, { personId: actor.personId, role: "member", was: "host" }, requestId);
    await expect(stepDown(first)).rejects.toMatchObject({ code: "moved_on" });
    await expect(closeAccount(first, { currentPassword: testPassword }, requestId)).rejects.toMatchObject({
      code: "moved_on",
    });
    const second = { ...(await makePerson(db.owner, "second", "host")), role: "host" } as const;
    const both = await Promise.allSettled([stepDown(first), stepDown(second)]);
    expect(both.map((each) => each.status).sort()).toEqual(["fulfilled", "rejected"]);
    expect(await db.owner("person").where({ role: "host" })).toHaveLength(1);
  });

  it("lists people by handle in pages that leave nobody out", async () => {
    const [row] = await db.owner("person").where({ role: "host" }).select("id");
    const host = { personId: String(row?.id), handle: "host", role: "host" } as const;
    const all = await readPeople(host, {});
    const seen = [];
    let after: string | null = null;
    do {
      const page: Awaited<ReturnType<typeof readPeople>> = await readPeople(host, {
        limit: 1,
        ...(after !== null && { after }),
      });
      seen.push(...page.items);
      after = page.next;
    } while (after !== null);
    expect(seen).toEqual(all.items);
    expect((await readPeople(host, { contains: "%" })).items).toEqual([]);
  });
});

describe("one's own account", () => {
  it("takes another handle unless somebody has it, and keeps mail choices", async () => {
    const person = await makePerson(db.owner, "tarn");
    await makePerson(db.owner, "marl");
    await expect(changeHandle(person, { handle: "marl" }, requestId)).rejects.toMatchObject({
      fields: [{ path: "handle" }],
    });
    await changeHandle(person, { handle: "tarn-two" }, requestId);
    const choices = { entry_state: true, questions: false, corrections: true, seasons: false, watched: false };
    await chooseMail(person, choices);
    expect(await readAccount(person)).toMatchObject({ handle: "tarn-two", mailChoices: choices });
  });

  it("moves to another address only by the letter that went there", async () => {
    const person = await makePerson(db.owner, "mover");
    await changeEmail(person, "moved@people.example", letters);
    expect(await readAccount(person)).toMatchObject({ email: "moved@people.example" });
    await letters.newest("mover@people.example", "Another address");
  });

  it("erased, leaves rows with an id that names nobody, and no name among people, letters, events or audit", async () => {
    const person = await makePerson(db.owner, "willow");
    await chooseMail(person, { entry_state: true, questions: true, corrections: true, seasons: true, watched: true });
    const wrong = { currentPassword: testPassword, handle: "osier" };
    await expect(eraseAccount(person, wrong, requestId)).rejects.toMatchObject({ fields: [{ path: "handle" }] });
    await expect(
      eraseAccount(person, { currentPassword: "not this one", handle: "willow" }, requestId),
    ).rejects.toMatchObject({ fields: [{ path: "currentPassword" }] });
    await eraseAccount(person, { currentPassword: testPassword, handle: "willow" }, requestId);
    const [row] = await db.owner("person").where({ id: person.personId });
    expect(row).toMatchObject({ email: null, handle: null, password_hash: null });
    expect(row?.erased_at).toBeInstanceOf(Date);
    const kept = await Promise.all(
      ["audit", "event", "mail_token", "mail_choice", "person"].map((table) => db.owner(table).select()),
    );
    expect(JSON.stringify(kept)).not.toContain("willow");
    await expect(readAccount(person)).rejects.toMatchObject({ code: "gone" });
  });
});
