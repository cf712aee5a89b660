import { jobs } from "@/lib/services/jobs/from-env";
import { log } from "../log";

/**
 * Tells a worker that a round's hour may have come, so that "now" needn't wait for the clock. Where the queue can't be
 * reached the minute's clock does the same a little later.
 */
export async function wakePublisher(): Promise<void> {
  try {
    const queue = await jobs((error) => log().error({ err: error }, "job queue"));
    await queue.send("publish-due", {}, { onceBy: "now" });
  } catch (error) {
    log().warn({ err: error }, "the publisher was not woken; its clock comes within a minute");
  }
}
