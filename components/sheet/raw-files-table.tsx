import { BarsTable } from "@/components/ui/bars/bars-table";
import type { RawRun, RawRuns, SessionFile } from "@/lib/contracts/raw-runs";
import { formatBytes } from "@/lib/format/bytes";
import { formatNumber } from "@/lib/format/numbers";

const kindWords = { temperature: "Temperature log", level: "Level log", recording: "Recording" } as const;

function what(file: SessionFile, run: RawRun | undefined): string {
  if (!run) return kindWords[file.kind];
  const subject = run.subject === "entry" ? "this design" : "the baseline";
  return `${kindWords[file.kind]}, ${subject}, mount ${run.mountNumber}${run.repeatNumber > 1 ? `, repeat ${run.repeatNumber}` : ""}`;
}

function read(file: SessionFile): string {
  const unit = file.kind === "recording" ? "samples" : "rows";
  const refused = file.refusedCount > 0 ? `, ${formatNumber(file.refusedCount)} refused` : "";
  return `${formatNumber(file.rowsRead)} ${unit}${refused}`;
}

/** The files that readings came from, as received: of some runs, or where `runs` is empty of the session itself. */
export function RawFilesTable({ caption, raw, runs }: { caption: string; raw: RawRuns; runs: readonly RawRun[] }) {
  const files = raw.files.filter((file) =>
    file.runId === null ? runs.length === 0 : runs.some((run) => run.runId === file.runId),
  );
  if (files.length === 0) return null;
  return (
    <BarsTable
      caption={caption}
      showCaption
      phone="fold"
      columns={[
        { key: "file", head: "File" },
        { key: "read", head: "Read" },
        { key: "bytes", head: "Size" },
        { key: "sha", head: "SHA-256" },
        { key: "state", head: "State" },
      ]}
      rows={files.map((file) => {
        const words = what(
          file,
          runs.find((run) => run.runId === file.runId),
        );
        return {
          key: file.id,
          cells: {
            file: {
              words:
                file.address === null ? (
                  words
                ) : (
                  <a href={file.address} download>
                    {words}
                  </a>
                ),
            },
            read: { words: read(file) },
            bytes: { words: formatBytes(file.bytes) },
            sha: { words: <span className="figures break-all">{file.sha256}</span> },
            state: { words: file.whyNotServed ?? "as received" },
          },
        };
      })}
    />
  );
}
