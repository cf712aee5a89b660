import { describe, expect, it } from "vitest";
import { designsQuery } from "@/lib/contracts/designs";
import { indexAddress, parseIndexQuery, settledQuery } from "@/lib/contracts/index-query";

const parse = (text: string) => parseIndexQuery(new URLSearchParams(text));

describe("a question in the address", () => {
  it("has one address, however its parts were ordered", () => {
    const address = "/designs?q=mill&blades1=7&blades1=9&gap-from=0.5&gap-to=1&sort=-level&columns=equal,rank&page=2";
    const asked = parse(
      "page=2&sort=-level&gap-to=1&gap-from=0.5&blades1=9&blades1=7&columns=equal&columns=rank&q=mill",
    );
    expect(indexAddress(asked).replaceAll("%2C", ",")).toBe(address);
    expect(parse(address.split("?")[1] ?? "")).toEqual({ ...asked, facets: { blades1: ["7", "9"] } });
  });

  it("passes over what can't be read without changing the rest", () => {
    const asked = parse("gap-from=wide&gap-to=&page=-3&sort=nonsense&colour=red&inlet=cone");
    expect(indexAddress(asked)).toBe("/designs?inlet=cone");
  });

  it("takes a bound with a decimal comma, as a plain form may send it", () => {
    expect(parse("gap-from=0,5").ranges).toEqual({ gap: { low: 0.5, high: null } });
  });
});

describe("over several benches", () => {
  it("puts the best match first where words were typed, and only there", () => {
    expect(parse("q=mill")).toMatchObject({ sort: "match", descending: false });
    expect(parse("q=mill&sort=-match")).toMatchObject({ sort: "match", descending: false });
    expect(parse("q=mill&sort=equal").sort).toBe("equal");
    expect(parse("sort=match").sort).toBe("equal");
    expect(indexAddress(parse("q=mill"))).toBe("/designs?q=mill");
    expect(indexAddress(parse("q=mill&sort=equal"))).toBe("/designs?q=mill&sort=equal");
    expect(indexAddress({ ...parse("q=mill"), q: "" })).toBe("/designs");
  });

  it("bounds and sorts by absolute figures are let go, others stay", () => {
    const asked = parse("equal-to=-1&gap-from=0.5&sort=leveldba");
    expect(settledQuery(asked, true)).toEqual(asked);
    expect(settledQuery(asked, false)).toMatchObject({ ranges: { gap: { low: 0.5, high: null } }, sort: "ratio" });
    expect(settledQuery(asked, false).ranges.equal).toBeUndefined();
  });
});

describe("the same question from a program", () => {
  const fields = (sent: Record<string, unknown>) =>
    designsQuery
      .safeParse(sent)
      .error?.issues.flatMap((issue) => (issue.code === "unrecognized_keys" ? issue.keys : [issue.path.join(".")]));

  it("is read as the address is", () => {
    const sent = { blades1: ["7", "9"], "gap-from": "0.5", sort: "-level", q: "mill" };
    expect(designsQuery.parse(sent)).toEqual(parse("blades1=7&blades1=9&gap-from=0.5&sort=-level&q=mill"));
  });

  it("is refused at every field that can't be used", () => {
    expect(fields({ "gap-from": "wide", sort: "colour", page: "0", colour: "red" })?.sort()).toEqual([
      "colour",
      "gap-from",
      "page",
      "sort",
    ]);
    expect(fields({ "gap-from": "2", "gap-to": "1" })).toEqual(["gap-to"]);
  });
});
