import { describe, expect, it } from "vitest";
import { clientAddress } from "@/lib/http/address";
import { peerHeader } from "@/lib/http/peer";

const from = (peer: string, forwarded?: string) =>
  new Headers({ [peerHeader]: peer, ...(forwarded !== undefined && { "x-forwarded-for": forwarded }) });

// Addresses are those that RFC 5737 and RFC 3849 set aside for documentation.
describe("the address that limits count", () => {
  it("is the socket's, whatever a stranger forwards", () => {
    expect(clientAddress(from("198.51.100.7", "203.0.113.9"), [])).toBe("198.51.100.7");
    expect(clientAddress(from("198.51.100.7", "203.0.113.9"), ["192.0.2.1"])).toBe("198.51.100.7");
  });

  it("is the last untrusted hop behind a trusted proxy, so a forged first hop gains nothing", () => {
    expect(clientAddress(from("192.0.2.1", "203.0.113.9, 198.51.100.7"), ["192.0.2.1"])).toBe("198.51.100.7");
    expect(clientAddress(from("192.0.2.1", "203.0.113.9, 198.51.100.7, 192.0.2.44"), ["192.0.2.0/24"])).toBe(
      "198.51.100.7",
    );
    expect(clientAddress(from("2001:db8::1", "2001:db8:1::5"), ["2001:db8::/48"])).toBe("2001:db8:1::5");
  });

  it("is the proxy's own where the list holds no address", () => {
    expect(clientAddress(from("192.0.2.1"), ["192.0.2.1"])).toBe("192.0.2.1");
    expect(clientAddress(from("192.0.2.1", "nonsense"), ["192.0.2.1"])).toBe("192.0.2.1");
  });

  it("reads IPv4 written as IPv6, and counts what it can't tell as one", () => {
    expect(clientAddress(from("::ffff:198.51.100.7"), [])).toBe("198.51.100.7");
    expect(clientAddress(new Headers({ "x-forwarded-for": "203.0.113.9" }), ["203.0.113.9"])).toBe("unknown");
  });
});
