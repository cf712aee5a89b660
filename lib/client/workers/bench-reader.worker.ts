import type { BenchRequest } from "@/lib/client/bench-reader/messages";
import { workBenchRequest } from "@/lib/client/bench-reader/work";

/** Reads recordings and logs of the bench beside the page, which goes on meanwhile. */
self.addEventListener("message", ({ data }: MessageEvent<BenchRequest>) => {
  void workBenchRequest(data, (said) => self.postMessage(said));
});
