import { runSearchSender } from "@/lib/server/search/sender";

/** The sender of the worker, alone in a process that a test may kill. */
await runSearchSender(new AbortController().signal);
