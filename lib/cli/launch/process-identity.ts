import { readFileSync } from "node:fs";

/**
 * What tells a process from a later one with the same number: the boot and the tick it began at.
 *
 * @returns undefined when there is no such process (or no /proc to ask)
 */
export function processIdentity(pid: number): string | undefined {
  try {
    const boot = readFileSync("/proc/sys/kernel/random/boot_id", "utf8").trim();
    const stat = readFileSync(`/proc/${pid}/stat`, "utf8");
    // The name in brackets may hold spaces and brackets; what is counted comes after the last one (proc(5), field 22).
    const fields = stat.slice(stat.lastIndexOf(")") + 2).split(" ");
    if (fields[0] === "Z") return undefined;
    return `${boot} ${fields[19]}`;
  } catch {
    return undefined;
  }
}
