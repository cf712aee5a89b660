import { appDb, publicDb } from "@/db/client/handles";
import { requiredEnv } from "@/lib/env/env";
import { log } from "@/lib/server/log";
import { mailer } from "@/lib/services/mail/from-env";
import { storage } from "@/lib/services/storage/from-env";

const parts = ["database", "publicDatabase", "files", "search", "mail"] as const;

export interface Health {
  ready: boolean;
  /** Each part by name; why one isn't ready stands in the log, not here. */
  parts: Record<(typeof parts)[number], "ready" | "not ready">;
}

/** Asks each part on which the product leans; each has its turn of a few seconds, all at once. */
const questions: Record<(typeof parts)[number], () => Promise<unknown>> = {
  // The newest table there is: an old schema is not ready either.
  database: () => Promise.resolve(appDb()("demo_seed").first("only_one")),
  publicDatabase: () => Promise.resolve(publicDb().raw("select 1")),
  files: () => storage().ready(),
  search: askSearch,
  mail: () => mailer().ready(),
};

async function askSearch(): Promise<void> {
  const address = new URL("/health", requiredEnv("MEILI_HOST"));
  const answer = await fetch(address, { signal: AbortSignal.timeout(limitMs), cache: "no-store" });
  if (!answer.ok) throw new Error(`The search service answered ${answer.status}.`);
}

const limitMs = 4_000;

/** Whether every part is ready, now. Never throws. */
export async function checkHealth(): Promise<Health> {
  const answers = await Promise.all(parts.map(async (part) => [part, await isReady(part)] as const));
  return {
    ready: answers.every(([, answer]) => answer === "ready"),
    parts: Object.fromEntries(answers) as Health["parts"],
  };
}

async function isReady(part: (typeof parts)[number]): Promise<"ready" | "not ready"> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<never>((_resolve, reject) => {
    timer = setTimeout(() => reject(new Error(`no answer in ${limitMs} ms`)), limitMs);
  });
  try {
    await Promise.race([questions[part](), late]);
    return "ready";
  } catch (error) {
    log().warn({ err: error, part }, "not ready");
    return "not ready";
  } finally {
    clearTimeout(timer);
  }
}
