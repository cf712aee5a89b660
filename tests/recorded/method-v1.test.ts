import { createHash } from "node:crypto";
import { describe, expect, it } from "vitest";
import { METHOD_V1 } from "@/lib/domain/results/methods/v1/parameters";
import type { SessionRecord } from "@/lib/domain/results/session-record";
import golden from "./method-v1.json";
import { methodV1Figures } from "./method-v1-figures";

// Recorded, not derived: that the figures are right is shown by tests/reference/results. This one shows that method 1
// still gives the digits it gave when it was frozen. When it fails, put the change into a new method, beside this one.
describe("method 1", () => {
  it("has the parameters it was frozen with", () => {
    expect(METHOD_V1).toEqual(golden.parameters);
  });

  it("gives the recorded digits: repeats, remounts, a bound, merged points, two positions, a run that is left out", () => {
    const session = golden.session as unknown as SessionRecord;
    expect(methodV1Figures(session, golden.levelsDba)).toEqual(golden.figures);
  });

  it("was not given a new golden result in passing: the file's own digest stands here", () => {
    const digest = createHash("sha256").update(JSON.stringify(golden)).digest("hex");
    expect(digest).toBe("d1df1ba5552300da17d6b7b05df59c05933a53319b70ef4d6a8318159076e739");
  });
});
