import { z } from "zod";

/** An empty variable counts as not set: `.env` files and compose files write `NAME=` for "nothing". */
const blankAsMissing = (value: unknown) => (typeof value === "string" && value.trim() === "" ? undefined : value);

const text = z.preprocess(blankAsMissing, z.string().trim().optional());
const address = (...schemes: string[]) =>
  z.preprocess(
    blankAsMissing,
    z
      .string()
      .trim()
      .refine((value) => schemes.some((scheme) => value.startsWith(`${scheme}://`)) && URL.canParse(value), {
        error: `must be an address that begins with ${schemes.map((scheme) => `${scheme}://`).join(" or ")}`,
      })
      .optional(),
  );
const list = z.preprocess(
  (value) => (typeof value === "string" ? value.split(",").flatMap((part) => part.trim() || []) : (value ?? [])),
  z.array(z.string()),
);
const flag = z.preprocess(
  (value) => ({ "1": true, true: true, "0": false, false: false, "": false })[String(value ?? "").toLowerCase()],
  z.boolean({ error: "must be 1 or 0" }),
);
const whole = (low: number, high: number, otherwise: number) =>
  z.preprocess(
    (value) => {
      const given = blankAsMissing(value);
      return given === undefined ? otherwise : /^\d+$/.test(String(given)) ? Number(given) : Number.NaN;
    },
    z
      .int({ error: `must be a whole number from ${low} to ${high}` })
      .min(low)
      .max(high),
  );

/** Every variable that the product reads; `.env.example` explains each (a test keeps the two the same). */
export const environmentSchema = z.object({
  NODE_ENV: z.preprocess(blankAsMissing, z.enum(["production", "development", "test"]).default("development")),
  PORT: whole(1, 65535, 3000),
  HOST: z.preprocess(blankAsMissing, z.string().trim().default("127.0.0.1")),
  DATA_DIR: text,
  LOG_LEVEL: z.preprocess(
    blankAsMissing,
    z.enum(["fatal", "error", "warn", "info", "debug", "trace", "silent"]).default("info"),
  ),
  DATABASE_URL: address("postgres", "postgresql"),
  MIGRATE_DATABASE_URL: address("postgres", "postgresql"),
  PUBLIC_DATABASE_URL: address("postgres", "postgresql"),
  DATABASE_POOL_MAX: whole(1, 200, 10),
  MEILI_HOST: address("http", "https"),
  MEILI_API_KEY: text,
  S3_ENDPOINT: address("http", "https"),
  S3_REGION: z.preprocess(blankAsMissing, z.string().trim().default("us-east-1")),
  S3_BUCKET: text,
  S3_ACCESS_KEY_ID: text,
  S3_SECRET_ACCESS_KEY: text,
  SMTP_URL: address("smtp", "smtps"),
  MAIL_FROM: z.preprocess(blankAsMissing, z.string().trim().default("Fanfold <no-reply@localhost>")),
  NEXTAUTH_URL: address("http", "https"),
  NEXTAUTH_SECRET: z.preprocess(blankAsMissing, z.string().min(32, "needs 32 characters or more").optional()),
  FIRST_HOST_EMAIL: text,
  TRUSTED_PROXIES: list,
  WEBHOOK_ALLOWED_HOSTS: list,
  FANFOLD_DEMO: flag,
});

export type Environment = z.infer<typeof environmentSchema>;

/** Thrown when a variable can't be used; names the variable and the reason, never its value (it may be a secret). */
export class EnvironmentError extends Error {
  override name = "EnvironmentError";
}

/**
 * Parses a set of variables.
 *
 * @param source names and values, as in `process.env`
 * @returns the parsed values; what is optional and missing or empty is undefined
 * @throws EnvironmentError with one line a wrong variable
 */
export function parseEnvironment(source: Record<string, string | undefined>): Environment {
  const parsed = environmentSchema.safeParse(source);
  if (parsed.success) return parsed.data;
  const lines = parsed.error.issues.map((issue) => `  ${issue.path.join(".")}: ${issue.message}`);
  throw new EnvironmentError(`These settings can't be used:\n${lines.join("\n")}`);
}
