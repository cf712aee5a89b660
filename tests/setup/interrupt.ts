/** Runs the clean-up when the test runner is told to stop from outside; gives what takes the arrangement back. */
export function onInterrupt(cleanUp: () => Promise<void>): () => void {
  const names = ["SIGTERM", "SIGHUP"] as const;
  const act = (): void => {
    void cleanUp().finally(() => process.exit(143));
  };
  for (const name of names) process.once(name, act);
  return () => {
    for (const name of names) process.off(name, act);
  };
}
