import { expect, test } from "vitest";
import { isLoopback } from "@/lib/cli/launch/loopback";

// RFC 1122 3.2.1.3 (127/8), RFC 4291 2.5.3 (::1), RFC 6761 6.3 (localhost).
test.each(["127.0.0.1", "127.9.9.9", "::1", "0:0:0:0:0:0:0:1", "localhost"])("%s is this machine alone", (host) => {
  expect(isLoopback(host)).toBe(true);
});

test.each([
  "0.0.0.0",
  "::",
  "10.0.0.1",
  "::ffff:10.0.0.1",
  "2001:db8::1",
  "localhost.example",
  "127.0.0.1.example",
  "",
  "1::1",
])("%j is not", (host) => {
  expect(isLoopback(host)).toBe(false);
});
