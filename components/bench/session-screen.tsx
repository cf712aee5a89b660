"use client";

import { useState } from "react";
import { CautionList } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import { useBenchSession } from "@/lib/client/bench";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { nextRun } from "@/lib/domain/bench/next-run";
import { BackgroundCheck } from "./background-check";
import { CalibratorCheck } from "./calibrator-check";
import { ControlSection } from "./control-section";
import { EndSession } from "./end-session";
import { FiguresTable } from "./figures-table";
import { HoldsList } from "./holds-list";
import { PasteForm } from "./paste-form";
import { PurposeSection } from "./purpose-section";
import { SessionHead } from "./session-head";
import { SessionNote } from "./session-note";
import { SubjectRuns, type Chosen } from "./subject-runs";
import { EntryToReview } from "./to-review";

const whileWorking = [
  "Guard in place, eye protection on, nobody in the rotor's plane; raise the speed in steps and stop on vibration.",
  "Cooler and heater burn skin: let them cool before a remount. Never leave the heater unattended.",
  "From 80 dB(A) keep your hearing protection on; near 85 dB(A) and above keep the time short.",
];

/** One sitting at the bench, in the order in which it is worked. */
export function SessionScreen({ initial, ownId }: { initial: BenchSession; ownId: string }) {
  const { data: session } = useBenchSession(initial);
  const next = session.endedAt ? undefined : nextRun(session.subjects);
  const [chosen, setChosen] = useState<Chosen | null>(null);
  const open = session.endedAt === null;
  const entries = session.subjects.filter((subject) => subject.entryId !== null);
  return (
    <>
      <SessionHead session={session} next={next} />
      {open ? (
        <Section id="cautions" tight>
          <CautionList title="while the rotor turns and the heat is on" items={whileWorking} />
        </Section>
      ) : null}
      <Section id="before" title="Before the runs" tone="bar">
        <div className="grid gap-8 lg:grid-cols-2">
          <CalibratorCheck session={session} phase="before" />
          <BackgroundCheck session={session} />
        </div>
      </Section>
      <Section id="runs" title="Runs" note="Baseline first and last; choose a run to type, paste or bring its log.">
        <div className="grid gap-8">
          {session.subjects.map((subject) => (
            <SubjectRuns
              key={subject.entryId ?? subject.baselineUnitId}
              session={session}
              subject={subject}
              next={next}
              chosen={chosen}
              onChoose={setChosen}
            />
          ))}
        </div>
        {entries.length === 0 && session.purpose === "round" ? (
          <p className="mt-4">No entry of this round is on the bench.</p>
        ) : null}
      </Section>
      {open ? (
        <Section id="paste" title="Paste from a spreadsheet" tone="bar">
          <PasteForm session={session} />
        </Section>
      ) : null}
      <Section id="figures" title="Figures so far" note="Corrected for background, against this session's baseline.">
        <FiguresTable session={session} />
      </Section>
      <ControlSection session={session} />
      <PurposeSection session={session} />
      <Section id="after" title="After the runs" tone="bar">
        <div className="grid gap-8 lg:grid-cols-2">
          <CalibratorCheck session={session} phase="after" />
          <SessionNote session={session} />
        </div>
      </Section>
      <Section id="end" title={open ? "End the session" : "What held it"}>
        <EndSession session={session} />
        <HoldsList session={session} ownId={ownId} />
      </Section>
      {open || session.purpose !== "round" ? null : (
        <Section id="to-review" title="To review" tone="bar">
          <ul className="grid gap-3">
            {entries.map((entry) => (
              <li key={entry.entryId} className="grid gap-1">
                <strong>{entry.name}</strong>
                {entry.state === "on_the_bench" && entry.entryId ? (
                  <EntryToReview entryId={entry.entryId} name={entry.name} />
                ) : (
                  <span className="docket">{entry.state?.replaceAll("_", " ")}</span>
                )}
              </li>
            ))}
          </ul>
        </Section>
      )}
    </>
  );
}
