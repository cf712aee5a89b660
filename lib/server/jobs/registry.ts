import type { JobData, JobHandler, QueueName } from "@/lib/services/jobs/jobs";
import { log } from "../log";
import { appDb } from "@/db/client/handles";
import { askForRebuild } from "@/db/queries/search-build";
import { sweepThrottle } from "@/db/queries/throttle";
import { readRecordingFile } from "../bench/read-recording";
import { deliveryLoop } from "../deliveries/deliver";
import { readStoredModel } from "../designs/read-stored-model";
import { publishDueRounds } from "../publishing/schedule";
import { compareIndex } from "../search/compare";
import { runSearchSender } from "../search/sender";
import { refreshStudies } from "../study/read-study";
import { readQuarantinedFile, sweepUploads } from "../uploads/read-file";

/** Work that goes on as long as the worker runs, the outbox's sender say; it ends soon after the signal. */
export interface Loop {
  name: string;
  run(signal: AbortSignal): Promise<void>;
}

interface Schedule<N extends QueueName> {
  queue: N;
  /** Cron, in UTC. */
  cron: string;
  data: JobData<N>;
}

/** What the worker does with each queue. A queue without a handler is left to another worker. */
export const jobHandlers: { [N in QueueName]?: JobHandler<N> } = {
  "file-read": ({ uploadId }) => readQuarantinedFile(uploadId, () => new Date()),
  "model-read": ({ fileId }) => readStoredModel(fileId),
  "recording-read": ({ recordingId }) => readRecordingFile(recordingId, () => new Date()),
  "search-rebuild": () => askForRebuild(appDb()),
  "search-compare": async () => void (await compareIndex()),
  sweep: async () => {
    await sweepThrottle(appDb());
    await sweepUploads(new Date());
  },
  "publish-due": async () => {
    const { published, refused } = await publishDueRounds(new Date());
    if (published.length > 0 || refused.length > 0) log().info({ published, refused }, "rounds whose hour has come");
  },
  // By the clock, and not with publishing: a worker that is killed between the two leaves no stale study behind.
  "study-refresh": async () => void (await refreshStudies()),
};

/** What is sent by the clock, however many workers run. */
export const jobSchedules: Schedule<QueueName>[] = [
  { queue: "publish-due", cron: "* * * * *", data: {} },
  { queue: "study-refresh", cron: "* * * * *", data: {} },
  { queue: "search-compare", cron: "40 3 * * *", data: {} },
  { queue: "sweep", cron: "17 * * * *", data: {} },
];

export const loops: Loop[] = [
  { name: "deliveries", run: deliveryLoop },
  { name: "search sender", run: runSearchSender },
];
