import { Readable } from "node:stream";
import { describe, expect, it } from "vitest";
import { dispositionOf, fileAnswer, partOf } from "@/lib/http/file-answer";

const body = "0123456789";
const file = { name: "rotor.stl", bytes: 10, sha256: "ab", type: "model/stl" };
const ask = (headers: Record<string, string>, method = "GET") =>
  fileAnswer(new Request("http://a.example/", { headers, method }), file, async (part) =>
    Readable.from([Buffer.from(part ? body.slice(part.first, part.last + 1) : body)]),
  );

describe("a part of a file", () => {
  // The examples of RFC 9110, 14.1.2, for a representation of 10,000 bytes.
  it.each([
    ["bytes=0-499", { first: 0, last: 499 }],
    ["bytes=500-999", { first: 500, last: 999 }],
    ["bytes=-500", { first: 9500, last: 9999 }],
    ["bytes=9500-", { first: 9500, last: 9999 }],
    ["bytes=9999-20000", { first: 9999, last: 9999 }],
    ["bytes=10000-", "outside"],
    ["bytes=-0", "outside"],
    ["bytes=0-0,-1", undefined],
    ["bytes=9-3", undefined],
    ["lines=1-2", undefined],
    ["bytes=-", undefined],
    [null, undefined],
  ])("%s", (header, part) => {
    expect(partOf(header, 10_000)).toEqual(part);
  });

  it("is answered with 206, its place and its length; beyond the end with 416", async () => {
    const part = await ask({ range: "bytes=2-4" });
    expect([part.status, part.headers.get("content-range"), part.headers.get("content-length")]).toEqual([
      206,
      "bytes 2-4/10",
      "3",
    ]);
    expect(await part.text()).toBe("234");
    const beyond = await ask({ range: "bytes=10-" });
    expect([beyond.status, beyond.headers.get("content-range")]).toEqual([416, "bytes */10"]);
    expect((await ask({ range: "bytes=2-4", "if-range": '"other"' })).status).toBe(200);
    expect((await ask({ "if-none-match": '"ab"' })).status).toBe(304);
  });
});

describe("a served file", () => {
  it("is a download that runs nothing, of the type that its content has", async () => {
    const answer = await ask({});
    expect(answer.headers.get("content-disposition")).toMatch(/^attachment;/);
    expect(answer.headers.get("content-security-policy")).toMatch(/^sandbox; default-src 'none'/);
    expect(answer.headers.get("x-content-type-options")).toBe("nosniff");
    expect(answer.headers.get("content-type")).toBe("model/stl");
    expect(await (await ask({}, "HEAD")).text()).toBe("");
  });

  it("keeps its name, whatever signs are in it, out of the header's own syntax", () => {
    expect(dispositionOf('a"; x="b\r\n.stl')).toBe(
      `attachment; filename="a_; x=_b__.stl"; filename*=UTF-8''a%22%3B%20x%3D%22b%0D%0A.stl`,
    );
    // RFC 8187, 3.2.3 has this example of UTF-8 in an extended value.
    expect(dispositionOf("€ rates")).toContain("filename*=UTF-8''%E2%82%AC%20rates");
  });
});
