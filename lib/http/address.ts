import { BlockList, isIP } from "node:net";
import { env } from "@/lib/env/env";
import { peerHeader } from "./peer";

/**
 * The address that a request came from: the socket's, or, where the socket's is a trusted proxy's, the last one in
 * X-Forwarded-For that isn't.
 *
 * @returns "unknown" when nothing tells, which counts as one address of its own
 */
export function clientAddress(headers: Headers, trusted: readonly string[] = env().TRUSTED_PROXIES): string {
  const peer = plain(headers.get(peerHeader) ?? "");
  if (!isIP(peer)) return "unknown";
  const proxies = blockList(trusted);
  if (!isTrusted(proxies, peer)) return peer;
  const hops = (headers.get("x-forwarded-for") ?? "").split(",").map((hop) => plain(hop.trim()));
  for (const hop of hops.reverse()) {
    if (!isIP(hop)) break;
    if (!isTrusted(proxies, hop)) return hop;
  }
  return peer;
}

/** Addresses and ranges as a list that can be asked; what is neither is left out. */
export function blockList(entries: readonly string[]): BlockList {
  const list = new BlockList();
  for (const entry of entries) {
    const [address = "", length] = entry.split("/");
    const family = isIP(address);
    if (family === 0) continue;
    const kind = family === 4 ? "ipv4" : "ipv6";
    if (length === undefined) list.addAddress(address, kind);
    else list.addSubnet(address, Number(length), kind);
  }
  return list;
}

function isTrusted(list: BlockList, address: string): boolean {
  return list.check(address, isIP(address) === 4 ? "ipv4" : "ipv6");
}

/** IPv4 addresses within IPv6 sockets, written as IPv4. */
function plain(address: string): string {
  return address.replace(/^::ffff:(?=\d+\.\d+\.\d+\.\d+$)/i, "");
}
