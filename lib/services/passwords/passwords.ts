import { hash, verify } from "@node-rs/argon2";

/** argon2id with the parameters that OWASP's Password Storage Cheat Sheet names first: 19 MiB, two passes, one lane. */
const parameters = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** The hash of a password that nobody has, so that an unknown account costs the same time as a known one. */
const nobodys = "$argon2id$v=19$m=19456,t=2,p=1$hmSXYdH7navU0srue506cA$IGN5Mxr0vZSy7FC2gmW6C0PpDGANzGiP56xRblmXVds";

/** A password as an argon2id string with its own salt. Unicode is brought to one form first, as keyboards differ. */
export async function hashPassword(password: string): Promise<string> {
  return hash(password.normalize("NFKC"), parameters);
}

/** Whether a password belongs to a stored hash; never when there is none, after the same work. */
export async function passwordFits(stored: string | undefined, password: string): Promise<boolean> {
  const fits = await verify(stored ?? nobodys, password.normalize("NFKC"));
  return stored !== undefined && fits;
}
