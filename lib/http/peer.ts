import { subscribe } from "node:diagnostics_channel";
import type { IncomingMessage } from "node:http";

/** Who is at the other end of the socket. Set by us on every request, whatever the client sent under the name. */
export const peerHeader = "x-fanfold-peer";
/** "1" when the client itself sent forwarding headers; the framework fills in some of its own later. */
export const forwardedHeader = "x-fanfold-forwarded";

const forwarding = [
  "forwarded",
  "x-forwarded-for",
  "x-forwarded-host",
  "x-forwarded-proto",
  "x-forwarded-port",
  "x-real-ip",
];

const kept = globalThis as typeof globalThis & { fanfoldPeers?: true };

/**
 * From now on every request of this process's HTTP servers carries its socket's address. The framework hands routes no
 * socket and keeps a forged X-Forwarded-For, so the address is written down before the framework sees the request.
 */
export function notePeers(): void {
  if (kept.fanfoldPeers) return;
  kept.fanfoldPeers = true;
  subscribe("http.server.request.start", (message) => {
    const { request } = message as { request: IncomingMessage };
    request.headers[peerHeader] = request.socket.remoteAddress ?? "";
    request.headers[forwardedHeader] = forwarding.some((name) => name in request.headers) ? "1" : "0";
  });
}
