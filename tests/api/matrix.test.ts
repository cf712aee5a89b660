import type { Knex } from "knex";
import { afterAll, beforeAll, describe, expect, inject, it } from "vitest";
import { connect } from "@/db/client/connect";
import { matrix, matrixRooms } from "./matrix-expectations";
import { matrixFacts, type MatrixFacts } from "./support/matrix-facts";
import type { MatrixRow } from "./support/matrix-row";
import { matrixRoles, matrixSessions, type MatrixSessions } from "./support/matrix-roles";
import { methodsOf, routesOfTree } from "./support/matrix-routes";

let owner: Knex;
let facts: MatrixFacts;
let sessions: MatrixSessions;

beforeAll(async () => {
  owner = connect(inject("server").urls.owner);
  facts = await matrixFacts(owner);
  sessions = await matrixSessions(owner);
});

afterAll(() => owner.destroy());

async function statusOf(route: string, row: MatrixRow, role: (typeof matrixRoles)[number]): Promise<number> {
  const [kind = "", address = ""] = route.split(" ");
  const path = row.path ? row.path(facts) : address;
  const body: unknown = typeof row.body === "function" ? row.body(facts) : row.body;
  const method = kind === "PAGE" ? "GET" : kind;
  const answer = await sessions[role].send(method, path, method === "GET" ? undefined : body);
  await answer.arrayBuffer();
  return answer.status;
}

describe("every route, for every role", () => {
  it("is in the matrix, and the matrix names no other", () => {
    expect(matrixRooms.flatMap((rows) => Object.keys(rows)).sort()).toEqual(routesOfTree());
  });

  it("is found however its file exports the method", () => {
    expect(methodsOf("export const GET = route();\nconst POST = 1;\nexport async function PUT() {}")).toEqual([
      "GET",
      "PUT",
    ]);
    expect(methodsOf('export { a as GET, b as DELETE } from "x";')).toEqual(["GET", "DELETE"]);
  });

  it("answers with the status that the matrix expects", async () => {
    const lines = [];
    const wrong = [];
    for (const [route, row] of Object.entries(matrix)) {
      const cells = [];
      for (const role of matrixRoles) {
        const status = await statusOf(route, row, role);
        const right = status === row.expected[role];
        cells.push(`${role} ${right ? status : `${status} (expected ${row.expected[role]})`}`);
        if (!right) wrong.push(`${route} as ${role}: ${status}, expected ${row.expected[role]}`);
      }
      lines.push(`${route.padEnd(44)} ${cells.join(" · ")}`);
    }
    console.log(lines.join("\n"));
    expect(wrong).toEqual([]);
  });
});
