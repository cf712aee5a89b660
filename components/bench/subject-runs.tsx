"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { ScrollRegion } from "@/components/ui/bars/scroll-region";
import type { BenchSession, BenchSubject } from "@/lib/contracts/bench-session";
import { sameSubject, type NextRun, type SubjectKey } from "@/lib/domain/bench/next-run";
import { RunCell } from "./run-cell";
import { RunPanel } from "./run-panel";
import { speedWords, type Cell } from "./words";

export interface Chosen extends Cell, SubjectKey {}

export type SubjectRunsProps = {
  session: BenchSession;
  subject: BenchSubject;
  next: NextRun | undefined;
  chosen: Chosen | null;
  onChoose: (chosen: Chosen | null) => void;
};

/** One subject's runs as a grid, mounts down and set speeds across: what is next, what is missing, what is done. */
export function SubjectRuns({ session, subject, next, chosen, onChoose }: SubjectRunsProps) {
  const [extra, setExtra] = useState(0);
  const { protocol } = session;
  const runs = session.runs.filter((run) => sameSubject(run, subject));
  const numbers = [...runs.map((run) => run.mountNumber), ...subject.missing.map(({ mount }) => mount)];
  const last = Math.max(0, ...numbers);
  const mounts = [...new Set([...numbers, ...Array.from({ length: extra }, (_, i) => last + i + 1)])].sort(
    (a, b) => a - b,
  );
  const speeds = [...protocol.setSpeeds].sort((a, b) => a - b);
  const isBaseline = subject.entryId === null;
  const here = chosen && sameSubject(chosen, subject) ? chosen : null;
  const left = subject.missing.reduce((sum, each) => sum + each.runs, 0);
  return (
    <div className={isBaseline ? "min-w-0 border-l-4 border-carbon pl-4" : "min-w-0"}>
      <div className="flex flex-wrap items-baseline gap-x-4">
        <h3>{subject.name}</h3>
        <span className="docket">
          {subject.specimenNumber ? `copy ${subject.specimenNumber} · ` : ""}
          {left === 0 ? "nothing missing" : `${left} runs missing`}
        </span>
      </div>
      {subject.sentBack ? <p className="max-w-2xl">Sent back: “{subject.sentBack}”</p> : null}
      {subject.closed && session.endedAt === null ? <p className="max-w-2xl">{subject.closed}</p> : null}
      <ScrollRegion label={`Runs of ${subject.name}`}>
        <table className="bars keeps-name">
          <caption className="sr-only">Runs of {subject.name}, mounts down, set speeds across</caption>
          <thead>
            <tr>
              <th scope="col">Mount</th>
              {speeds.map((speed) => (
                <th key={speed} scope="col">
                  {speedWords(speed, protocol.setting)}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {mounts.map((mount) => (
              <tr key={mount}>
                <th scope="row">{mount}</th>
                {speeds.map((setSpeed) => (
                  <td key={setSpeed}>
                    <RunCell
                      session={session}
                      subject={subject}
                      cell={{ setSpeed, mountNumber: mount }}
                      isNext={
                        next !== undefined &&
                        sameSubject(next, subject) &&
                        next.mount === mount &&
                        next.setSpeed === setSpeed
                      }
                      isChosen={here?.mountNumber === mount && here.setSpeed === setSpeed}
                      onChoose={() =>
                        onChoose({
                          entryId: subject.entryId,
                          baselineUnitId: subject.baselineUnitId,
                          setSpeed,
                          mountNumber: mount,
                        })
                      }
                    />
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollRegion>
      {subject.closed === null ? (
        <Button kind="quiet" small aria-label={`Add a mount of ${subject.name}`} onClick={() => setExtra(extra + 1)}>
          Add a mount
        </Button>
      ) : null}
      {here ? (
        <RunPanel
          key={`${here.entryId ?? here.baselineUnitId} ${here.mountNumber} ${here.setSpeed}`}
          session={session}
          subject={subject}
          cell={here}
          onClose={() => onChoose(null)}
        />
      ) : null}
    </div>
  );
}
