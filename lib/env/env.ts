import { parseEnvironment, type Environment } from "./schema";

let parsed: Environment | undefined;

/**
 * The settings of this process, parsed at the first call and kept. Call it inside functions, not while a module loads:
 * the production build loads modules without any setting.
 *
 * @throws EnvironmentError when a variable can't be used
 */
export function env(): Environment {
  parsed ??= parseEnvironment(process.env);
  return parsed;
}

/** Those settings that a part can't do without; the error names the variable that is missing. */
export function requiredEnv<K extends keyof Environment>(name: K): NonNullable<Environment[K]> {
  const value = env()[name];
  if (value === undefined || value === null) throw new Error(`${String(name)} is not set.`);
  return value;
}

/**
 * The environment for a child process: this process's own, with some variables set, or taken out where undefined is given.
 */
export function childEnvironment(changes: Record<string, string | undefined>): Record<string, string> {
  const merged = { ...process.env, ...changes };
  return Object.fromEntries(
    Object.entries(merged).flatMap(([name, value]) => (value === undefined ? [] : [[name, value]])),
  );
}

/** One variable as it stands, for tools outside the product's settings (`CI`, say). Undefined when missing or empty. */
export function rawVariable(name: string): string | undefined {
  return process.env[name] || undefined;
}

/** Sets variables of this process and parses anew: for launchers that learn an address only once a service is up. */
export function adoptEnvironment(changes: Record<string, string>): Environment {
  Object.assign(process.env, changes);
  parsed = undefined;
  return env();
}
