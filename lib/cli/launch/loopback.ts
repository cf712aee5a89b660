import net from "node:net";

/** Whether listening there is reached from this machine alone. A name counts only when it is localhost. */
export function isLoopback(host: string): boolean {
  if (host === "localhost") return true;
  const family = net.isIP(host);
  return (family === 4 && host.startsWith("127.")) || (family === 6 && /^(0*:)*0*1$/.test(host));
}

/** Whether a program can listen on that address now. */
export function canListen(host: string, port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const probe = net.createServer();
    probe.once("error", () => resolve(false));
    probe.listen({ port, host, exclusive: true }, () => probe.close(() => resolve(true)));
  });
}
