import { Fold } from "@/components/ui/fold";
import { Notice } from "@/components/ui/notice";
import { BarsTable } from "@/components/ui/bars/bars-table";
import type { LogAnswer } from "@/lib/contracts/bench-logs";
import type { FoundLog } from "@/lib/client/bench-reader/messages";

/** A log as read here, or as the server answered when it was kept. */
export type ShownLog = (Omit<FoundLog, "reading"> | LogAnswer) & Pick<LogAnswer, "logFileId" | "readingIds">;

const whole = (value: number | null): string => (value === null ? "an unknown time" : `${Math.round(value)} s`);

/** What a log says: its first rows, each refused row with line and reason, and whether a reading comes of it. */
export function LogReport({ answer, kind }: { answer: ShownLog; kind: "temperature" | "level" }) {
  const { temperature, level, refused, refusedCount, warnings } = answer;
  const verdict =
    kind === "temperature" && temperature && temperature.deltaTK !== null
      ? `Steady from ${whole(temperature.steady.fromS)} to ${whole(temperature.steady.toS)} (${temperature.steady.how}): ΔT ${temperature.deltaTK.toFixed(2)} K, u ${temperature.uDeltaTK?.toFixed(3) ?? "–"} K, ambient ${temperature.ambientC?.toFixed(1) ?? "–"} °C.`
      : kind === "level" && level && level.laeqDba !== null
        ? `Energy mean of ${level.n} rows: ${level.laeqDba.toFixed(2)} dB(A).`
        : "";
  return (
    <div className="grid gap-3">
      <p role="status">
        {answer.rows} rows read, {refusedCount} refused.{" "}
        {answer.logFileId === null
          ? "Nothing is kept yet."
          : answer.readingIds.length > 0
            ? "Kept, with its reading."
            : "Kept, without a reading."}
      </p>
      {answer.unusable === null ? (
        <Notice title="A reading comes of it">
          <p>{verdict}</p>
        </Notice>
      ) : (
        <Notice kind="wrong" title="no reading comes of it">
          <p>{answer.unusable}</p>
        </Notice>
      )}
      {warnings.length > 0 ? (
        <ul className="list-[square] pl-5">
          {warnings.map((warning) => (
            <li key={warning.code}>{warning.message}</li>
          ))}
        </ul>
      ) : null}
      <BarsTable
        caption="First rows as read"
        showCaption
        columns={[
          { key: "time", head: "Time", unit: "s" },
          ...(kind === "temperature"
            ? [
                { key: "sensor", head: "Sensor", unit: "°C" },
                { key: "ambient", head: "Ambient", unit: "°C" },
              ]
            : [{ key: "level", head: "Level", unit: "dB(A)" }]),
        ]}
        rows={answer.preview.map((row, i) => ({
          key: String(i),
          cells: {
            time: { figure: { value: row.timeS, decimals: 1, why: "no time column" } },
            sensor: { figure: { value: row.sensorC, decimals: 2, why: "the cell is empty" } },
            ambient: { figure: { value: row.ambientC, decimals: 2, why: "the cell is empty" } },
            level: { figure: { value: row.levelDba, decimals: 1, why: "the cell is empty" } },
          },
        }))}
      />
      {refusedCount > 0 ? <RefusedRows refused={refused} count={refusedCount} open /> : null}
    </div>
  );
}

/** Rows that couldn't be read, each with its line and reason. */
export function RefusedRows({
  refused,
  count,
  open,
}: {
  refused: readonly { line: number; reason: string }[];
  count: number;
  open?: boolean;
}) {
  return (
    <Fold title={`${count} refused rows`} open={open}>
      {count > refused.length ? <p>The first {refused.length} of them:</p> : null}
      <BarsTable
        caption="Refused rows"
        columns={[
          { key: "line", head: "Line" },
          { key: "reason", head: "Reason" },
        ]}
        rows={refused.map(({ line, reason }) => ({
          key: String(line),
          cells: { line: { figure: { value: line, decimals: 0 } }, reason: { words: reason } },
        }))}
      />
    </Fold>
  );
}
