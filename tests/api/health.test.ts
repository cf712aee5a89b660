import { expect, inject, test } from "vitest";
import { connect } from "@/db/client/connect";
import { signedOut, signInAs } from "@/tests/setup/session";

test("health says ready, part by part, to anybody", async () => {
  const answer = await signedOut().fetch("/api/v1/health");
  expect(answer.status).toBe(200);
  expect(answer.headers.get("cache-control")).toBe("no-store");
  expect(await answer.json()).toEqual({
    ready: true,
    parts: { database: "ready", publicDatabase: "ready", files: "ready", search: "ready", mail: "ready" },
  });
});

test("health turns to 503 and names the part while the database refuses, and back to 200 after it", async () => {
  const { urls } = inject("server");
  const owner = connect(urls.owner, { poolMax: 1 });
  try {
    await owner.raw("revoke select on demo_seed from fanfold_app");
    const answer = await signedOut().fetch("/api/v1/health");
    expect(answer.status).toBe(503);
    expect(await answer.json()).toMatchObject({ ready: false, parts: { database: "not ready", search: "ready" } });
  } finally {
    await owner.raw("grant select on demo_seed to fanfold_app");
    await owner.destroy();
  }
  expect((await signedOut().fetch("/api/v1/health")).status).toBe(200);
});

test("the demo's accounts can sign in with the password that the start prints", async () => {
  for (const who of ["host", "operator", "reviewer", "designer", "member"] as const) {
    expect((await signInAs(who)).cookie()).toContain("session");
  }
});
