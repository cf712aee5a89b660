import { isLoopbackHost } from "@/lib/env/site";
import { forwardedHeader, peerHeader } from "./peer";

/**
 * Why the demo, whose passwords everybody knows, doesn't answer a request; undefined when it does. Only this machine's
 * own browser is served: by a loopback name, over a loopback socket, through no proxy.
 */
export function whyDemoRefuses(headers: Headers): string | undefined {
  const host = headers.get("host") ?? "";
  const name = URL.canParse(`http://${host}`) ? new URL(`http://${host}`).hostname : "";
  if (!isLoopbackHost(name)) return "The demo answers only to names of this machine, such as 127.0.0.1 or localhost.";
  if (headers.get(forwardedHeader) !== "0") return "The demo doesn't answer through a proxy.";
  if (!isLoopbackHost(headers.get(peerHeader) ?? "")) return "The demo answers only to this machine.";
  return undefined;
}
