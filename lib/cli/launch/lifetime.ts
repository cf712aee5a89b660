/** What a launcher has started, to be stopped in the opposite order, once, whatever ends it. */
export interface Lifetime {
  /** Registers how to stop something. Neighbours that are `together` stop at the same time. */
  onStop(stop: () => Promise<void>, how?: "together"): void;
  /** Throws once stopping has begun: called between steps of a start. */
  check(): void;
  readonly stopping: boolean;
  stopAll(): Promise<void>;
}

export class StoppedError extends Error {
  override name = "StoppedError";
}

export function lifetime(): Lifetime {
  const stops: { stop: () => Promise<void>; how: "together" | undefined }[] = [];
  let stopping = false;
  return {
    get stopping() {
      return stopping;
    },
    onStop(stop, how) {
      stops.push({ stop, how });
    },
    check() {
      if (stopping) throw new StoppedError("Stopped.");
    },
    async stopAll() {
      stopping = true;
      for (let last = stops.pop(); last; last = stops.pop()) {
        const now = [last];
        while (last.how === "together" && stops.at(-1)?.how === "together") now.push(...stops.splice(-1));
        for (const each of await Promise.allSettled(now.map(({ stop }) => stop()))) {
          if (each.status === "rejected") console.error("While stopping:", String(each.reason));
        }
      }
    },
  };
}

/**
 * Runs a launch: signals stop it, a failure stops what it had started, and the exit code tells which.
 *
 * @param begin starts everything; resolves once it is up, with what resolves when a part ends by itself
 */
export async function runLaunch(begin: (life: Lifetime) => Promise<{ broken: Promise<string> }>): Promise<void> {
  const life = lifetime();
  let up = false;
  let asked: NodeJS.Signals | undefined;
  const starting = begin(life);
  const told = new Promise<void>((resolve) => {
    for (const name of ["SIGINT", "SIGTERM", "SIGHUP"] as const) {
      process.on(name, () => {
        if (asked === undefined) console.log(`\nStopping (${name}) …`);
        asked ??= name;
        resolve();
      });
    }
  });
  let failure: string | undefined;
  await Promise.race([
    told,
    starting.then(
      async ({ broken }) => {
        up = true;
        failure = await broken;
      },
      (error: unknown) => {
        if (!(error instanceof StoppedError)) failure = error instanceof Error ? error.message : String(error);
      },
    ),
  ]);
  await life.stopAll();
  // A step that was under way when the signal came may have registered one thing more.
  await starting.catch(() => undefined);
  await life.stopAll();
  if (failure !== undefined && asked === undefined) console.error(`\n${failure}`);
  const interrupted = asked === "SIGINT" ? 130 : 143;
  process.exit(asked === undefined ? 1 : up ? 0 : interrupted);
}
