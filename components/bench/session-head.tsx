import Link from "next/link";
import { Facts } from "@/components/ui/facts";
import { Section } from "@/components/ui/sheet";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { sameSubject, type NextRun } from "@/lib/domain/bench/next-run";
import { formatDateTime } from "@/lib/format/dates";
import { purposeWords, speedWords } from "./words";

/** Which session this is, on what and by which protocol, and what comes next. */
export function SessionHead({ session, next }: { session: BenchSession; next: NextRun | undefined }) {
  const { protocol, bench, baseline, round, positions } = session;
  const used = positions.filter((position) => position.used).map((position) => position.name);
  const nextName = next ? session.subjects.find((subject) => sameSubject(subject, next))?.name : undefined;
  const nextWords = next ? `${nextName}, mount ${next.mount} at ${speedWords(next.setSpeed, protocol.setting)}` : "";
  const held = session.holds.filter((hold) => hold.liftedAt === null).length;
  return (
    <Section
      id="session"
      level={1}
      title={`Session ${session.number}`}
      note={round ? `${round.seasonTitle}, round ${round.number}` : purposeWords[session.purpose]}
      aside={<Link href="/bench">Bench</Link>}
    >
      <p role="status" className="mb-4 text-lg font-bold">
        {session.endedAt === null
          ? next
            ? `Next: ${nextWords}`
            : "Every run is there: calibrator after, then end the session."
          : held > 0
            ? `Closed and held: ${held} to lift.`
            : "Closed."}
      </p>
      <Facts
        facts={[
          { label: "Bench", value: `${bench.name}, version ${bench.number}: ${bench.cooler}` },
          { label: "Baseline", value: `${baseline.name} ${baseline.serial}` },
          {
            label: "Protocol",
            value: `${protocol.heatLoadW} W; ${protocol.setSpeeds
              .map((speed) => speedWords(speed, protocol.setting))
              .join(", ")}; ${protocol.mounts} mounts; ${used.join(", ")}`,
          },
          { label: "Ambient", value: `${protocol.ambientMinC} to ${protocol.ambientMaxC} °C` },
          { label: "Operator", value: session.operator.handle ?? "an erased account" },
          { label: "Began", value: formatDateTime(session.beganAt) },
          ...(session.endedAt ? [{ label: "Ended", value: formatDateTime(session.endedAt) }] : []),
        ]}
      />
    </Section>
  );
}
