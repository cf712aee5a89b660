import { Button } from "@/components/ui/button";
import type { BenchSession, BenchSubject } from "@/lib/contracts/bench-session";
import { sameSubject } from "@/lib/domain/bench/next-run";
import { sameCell, speedWords, type Cell } from "./words";

export type RunCellProps = {
  session: BenchSession;
  subject: BenchSubject;
  cell: Cell;
  isNext: boolean;
  isChosen: boolean;
  onChoose: () => void;
};

/** One mount at one set speed: its state, and a press that opens it. */
export function RunCell({ session, subject, cell, isNext, isChosen, onChoose }: RunCellProps) {
  const runs = session.runs.filter(
    (run) => sameSubject(run, subject) && run.state !== "discarded" && sameCell(run, cell),
  );
  const missing = subject.missing.some((each) => each.mount === cell.mountNumber && each.setSpeed === cell.setSpeed);
  const run = runs[0];
  const lacks = run && run.state !== "done" && run.lacks.length > 0 ? `, lacks ${run.lacks.length}` : "";
  const words = run
    ? `${run.state}${runs.length > 1 ? ` ×${runs.length}` : ""}${lacks}`
    : isNext
      ? "next"
      : missing
        ? "missing"
        : "–";
  const name = `${subject.name}, mount ${cell.mountNumber} at ${speedWords(cell.setSpeed, session.protocol.setting)}`;
  return (
    <Button
      small
      kind={isNext && !run ? "solid" : run?.state === "held" ? "danger" : "outline"}
      aria-label={`${name}: ${words}`}
      aria-expanded={isChosen}
      onClick={onChoose}
    >
      {words}
    </Button>
  );
}
