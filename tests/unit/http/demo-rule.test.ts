import { describe, expect, it } from "vitest";
import { whyDemoRefuses } from "@/lib/http/demo-rule";
import { forwardedHeader, peerHeader } from "@/lib/http/peer";

const request = (host: string, peer = "127.0.0.1", forwarded = "0") =>
  whyDemoRefuses(new Headers({ host, [peerHeader]: peer, [forwardedHeader]: forwarded }));

describe("the demo, whose passwords are public", () => {
  it("answers this machine by a loopback name", () => {
    for (const host of ["127.0.0.1:3000", "localhost:3000", "[::1]:3000", "127.8.8.8"]) {
      expect(request(host)).toBeUndefined();
    }
    expect(request("localhost", "::1")).toBeUndefined();
    expect(request("localhost", "::ffff:127.0.0.1")).toBeUndefined();
  });

  it("refuses any other Host, also one that begins or ends like loopback", () => {
    for (const host of ["fanfold.example", "127.0.0.1.example", "localhost.example", "evil@example", "192.0.2.1", ""]) {
      expect(request(host)).toBeDefined();
    }
  });

  it("refuses what came through a proxy or from another machine, and what it can't tell", () => {
    expect(request("localhost", "127.0.0.1", "1")).toBeDefined();
    expect(request("localhost", "198.51.100.7")).toBeDefined();
    expect(whyDemoRefuses(new Headers({ host: "localhost" }))).toBeDefined();
  });
});
