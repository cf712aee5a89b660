import { describe, expect, it } from "vitest";
import { ANONYMOUS, ROLES, type Actor, type Role } from "@/lib/domain/accounts/actor";
import { may, PERMISSIONS } from "@/lib/domain/accounts/policy";
import { entryParts, maySeeFiguresBeforeTheHour, mayWorkRun, whyNotSign } from "@/lib/domain/accounts/signing";

const person = (role: Role): Actor => ({ personId: `p-${role}`, handle: role, role });
const clean = { lentToActor: false, tookReading: false, ownedInRound: false };

describe("role policy", () => {
  it("gives a signed-out person what is published and nothing else", () => {
    const context = { ownsDesign: true, ownedInRound: false };
    expect(PERMISSIONS.filter((permission) => may(ANONYMOUS, permission, context))).toEqual(["published.read"]);
  });

  it("gives the owner of a design the designer's rights over it and nothing else", () => {
    const member = person("member");
    const gained = PERMISSIONS.filter((each) => may(member, each, { ownsDesign: true }) && !may(member, each));
    expect(gained).toEqual([
      "design.read",
      "design.edit",
      "design.owners",
      "entry.send",
      "entry.withdraw",
      "entry.state",
    ]);
  });

  it("lets nobody edit a design by role alone", () => {
    for (const role of ROLES) expect(may(person(role), "design.edit", { ownedInRound: false })).toBe(false);
  });

  it("hides a round's figures from an operator or host who owned an entry of it, and when that wasn't looked up", () => {
    for (const role of ["operator", "host"] as const) {
      expect(may(person(role), "round.figures", { ownedInRound: false })).toBe(true);
      expect(may(person(role), "round.figures", { ownedInRound: true })).toBe(false);
      expect(may(person(role), "round.figures")).toBe(false);
    }
    expect(may(person("member"), "round.figures", { ownedInRound: false })).toBe(false);
  });
});

describe("who may sign", () => {
  it("is an operator, a host or the member to whom the round was lent", () => {
    expect(whyNotSign(person("operator"), clean)).toBeUndefined();
    expect(whyNotSign(person("host"), clean)).toBeUndefined();
    expect(whyNotSign(person("member"), clean)).toBe("not_lent");
    expect(whyNotSign(person("member"), { ...clean, lentToActor: true })).toBeUndefined();
    expect(whyNotSign(ANONYMOUS, { ...clean, lentToActor: true })).toBe("signed_out");
  });

  it("is nobody who took a reading or owned an entry, whatever the role", () => {
    for (const role of ROLES) {
      const lent = { ...clean, lentToActor: true };
      expect(whyNotSign(person(role), { ...lent, tookReading: true })).toBe("took_a_reading");
      expect(whyNotSign(person(role), { ...lent, ownedInRound: true })).toBe("owned_an_entry");
    }
  });

  it("keeps owners from runs of their entries and from figures before the hour", () => {
    expect(mayWorkRun(person("operator"), false)).toBe(true);
    expect(mayWorkRun(person("host"), true)).toBe(false);
    expect(mayWorkRun(person("member"), false)).toBe(false);
    expect(maySeeFiguresBeforeTheHour(person("host"), { ...clean, ownedInRound: true })).toBe(false);
    expect(maySeeFiguresBeforeTheHour(person("member"), { ...clean, lentToActor: true })).toBe(true);
    expect(maySeeFiguresBeforeTheHour(person("member"), clean)).toBe(false);
  });

  it("counts the designer and the reviewer among the parts that move an entry", () => {
    expect(entryParts(person("operator"), { ...clean, ownsDesign: false })).toEqual(["operator", "reviewer"]);
    expect(entryParts(person("member"), { ...clean, ownedInRound: true, ownsDesign: true })).toEqual(["designer"]);
    expect(entryParts(ANONYMOUS, { ...clean, ownsDesign: true })).toEqual([]);
  });
});
