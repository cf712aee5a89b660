import { readFileSync } from "node:fs";
import path from "node:path";
import { expect, test } from "vitest";
import { environmentSchema, parseEnvironment } from "@/lib/env/schema";

test("with nothing set the demo's defaults hold, and an empty variable counts as not set", () => {
  const expected = { PORT: 3000, HOST: "127.0.0.1", FANFOLD_DEMO: false, TRUSTED_PROXIES: [], DATABASE_POOL_MAX: 10 };
  expect(parseEnvironment({})).toMatchObject(expected);
  expect(parseEnvironment({ PORT: "", HOST: " ", DATABASE_URL: "", FANFOLD_DEMO: "" })).toMatchObject(expected);
  expect(parseEnvironment({ DATABASE_URL: "" }).DATABASE_URL).toBeUndefined();
});

test.each([
  ["PORT", "0"],
  ["PORT", "70000"],
  ["PORT", "3000.5"],
  ["PORT", "http"],
  ["DATABASE_URL", "mysql://x"],
  ["MEILI_HOST", "localhost:7700"],
  ["SMTP_URL", "http://mail"],
  ["NEXTAUTH_SECRET", "short"],
  ["FANFOLD_DEMO", "maybe"],
  ["LOG_LEVEL", "loud"],
])("%s=%s is refused by its name, without its value", (name, value) => {
  expect(() => parseEnvironment({ [name]: value })).toThrow(new RegExp(`${name}: `));
  expect(() => parseEnvironment({ [name]: value })).not.toThrow(new RegExp(value.replace(".", "\\.")));
});

test("lists are split at commas and trimmed", () => {
  expect(parseEnvironment({ TRUSTED_PROXIES: " 10.0.0.0/8, ::1 ,," }).TRUSTED_PROXIES).toEqual(["10.0.0.0/8", "::1"]);
});

test(".env.example names every setting and no other, and its values are the defaults", () => {
  const file = readFileSync(path.resolve(import.meta.dirname, "../../../.env.example"), "utf8");
  const shown = Object.fromEntries(
    [...file.matchAll(/^([A-Z0-9_]+)=(.*)$/gm)].map(([, name = "", value = ""]) => [name, value.replaceAll('"', "")]),
  );
  expect(Object.keys(shown).sort()).toEqual(Object.keys(environmentSchema.shape).sort());
  expect(parseEnvironment(shown)).toEqual(parseEnvironment({}));
});
