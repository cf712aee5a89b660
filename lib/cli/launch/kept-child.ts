import { bearEnds } from "./borne-ends";
import { startChild, type ChildOptions } from "./children";
import type { LaunchLedger } from "./ledger";
import type { Lifetime } from "./lifetime";

/** A child that is started again when it ends by itself. */
export interface KeptChild {
  /** Resolves with what happened when it ends by itself for the first time: while things start, that is a failure. */
  firstEnd: Promise<string>;
  /** Resolves with what happened once it ended too often to be started again. */
  gaveUp: Promise<string>;
}

/** Starts a child and starts it again whenever it ends by itself, until the lifetime stops or it ends too often. */
export function keepChild(life: Lifetime, ledger: LaunchLedger | undefined, options: ChildOptions): KeptChild {
  const first = startChild(life, ledger, options);
  const told = (code: number): string => `The ${options.name} ended (exit ${code}).`;
  const again = bearEnds();
  const keep = async (): Promise<string> => {
    for (let running = first; ; running = startChild(life, ledger, options)) {
      const code = await running.ended;
      // What is left of its group may hold its port.
      await running.stop();
      if (life.stopping || !again()) return told(code);
      console.error(`${told(code)} It is started again.`);
    }
  };
  return {
    firstEnd: first.ended.then(told),
    gaveUp: keep().catch((error: unknown) => `The ${options.name} can't be started again: ${String(error)}`),
  };
}
