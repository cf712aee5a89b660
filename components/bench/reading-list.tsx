"use client";

import { Value } from "@/components/ui/value";
import type { BenchReadingView, BenchSession } from "@/lib/contracts/bench-session";
import { formatTime } from "@/lib/format/dates";
import { SupersedeForm } from "./supersede-form";
import { quantityWords } from "./words";

export function readingName(reading: BenchReadingView, session: BenchSession): string {
  const position = session.positions.find((each) => each.id === reading.positionId)?.name;
  const words = quantityWords[reading.quantity] ?? reading.quantity;
  if (reading.rotorPosition !== null) return `${words} ${reading.rotorPosition}`;
  const heated = session.backgrounds.find((each) => each.readingId === reading.id)?.heated;
  return [words, reading.phase, position].filter(Boolean).join(" ") + (heated ? ", heater on" : "");
}

/** Readings as kept, superseded ones struck out beside the new; each that stands can be superseded with a reason. */
export function ReadingList({ readings, session }: { readings: readonly BenchReadingView[]; session: BenchSession }) {
  if (readings.length === 0) return null;
  const changes = session.endedAt === null || session.sentBack;
  return (
    <ul className="grid gap-1">
      {readings.map((reading) => {
        const name = readingName(reading, session);
        const gone = reading.supersededBy !== null;
        return (
          <li key={reading.id} className="flex flex-wrap items-baseline gap-x-3">
            <span>{name}</span>
            <span className={gone ? "line-through" : "font-bold"}>
              <Value
                value={reading.value}
                decimals={reading.source === "log" || reading.quantity === "calibrator_db" ? 2 : 1}
                unit={reading.unit}
              />
            </span>
            <span className="docket">
              {reading.source}, {reading.takenBy.handle ?? "an erased account"}, {formatTime(reading.takenAt)}
              {gone ? ", superseded" : ""}
              {reading.reason ? ` (${reading.reason})` : ""}
            </span>
            {typeof reading.detail.how === "string" ? <span className="docket">{reading.detail.how}</span> : null}
            {!gone && changes ? <SupersedeForm reading={reading} name={name} /> : null}
          </li>
        );
      })}
    </ul>
  );
}
