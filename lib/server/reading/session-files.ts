import { publicDb } from "@/db/client/handles";
import { shownSessionFile, type SessionFileRow } from "@/db/queries/shown/session-files";
import type { SessionFile } from "@/lib/contracts/raw-runs";
import { ExpectedError } from "@/lib/domain/expected-error";
import { formatDate } from "@/lib/format/dates";

/** A log or recording as readers are told of it. */
export function sessionFileOf(file: SessionFileRow): SessionFile {
  const { id, runId, kind, rowsRead, refusedCount, bytes, sha256 } = file;
  const why = whyNotServed(file);
  return {
    ...{ id, runId, kind, rowsRead, refusedCount, bytes, sha256 },
    address: why === null ? `/api/v1/session-files/${id}` : null,
    whyNotServed: why,
    at: file.at.toISOString(),
  };
}

function whyNotServed(file: SessionFileRow): string | null {
  if (file.state === "taken_down") {
    const on = file.takenDownAt === null ? "" : ` on ${formatDate(file.takenDownAt)}`;
    return `taken down${on}: ${file.reason ?? "no reason was given"}`;
  }
  return file.cleared ? null : "not served before somebody listened to it and heard no voices";
}

/**
 * A log or recording behind published figures, as it was received.
 * @throws ExpectedError not_found, alike for none and for one that isn't public; gone once taken down; moved_on for a
 * recording that nobody has listened to yet
 */
export async function findSessionFile({ fileId }: { fileId: string }): Promise<SessionFileRow> {
  const file = await shownSessionFile(publicDb(), { fileId });
  if (!file) throw new ExpectedError("not_found", "There is no such public file.");
  const why = whyNotServed(file);
  if (why !== null) throw new ExpectedError(file.state === "taken_down" ? "gone" : "moved_on", `This file is ${why}.`);
  return file;
}
