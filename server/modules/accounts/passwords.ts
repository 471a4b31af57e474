import { hash, verify } from '@node-rs/argon2';

/** argon2id (the package's default algorithm) at the OWASP Password Storage Cheat Sheet's m = 19 MiB, t = 2, p = 1. */
const OPTIONS = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

/** The same letters typed on two systems may come as different code points (NIST SP 800-63B-4, 3.1.1.2: NFKC). */
const stable = (password: string) => password.normalize('NFKC');

/** Hash a password for keeping. */
export const hashPassword = (password: string): Promise<string> => hash(stable(password), OPTIONS);

let dummy: Promise<string> | undefined;

/**
 * Whether a password is the one behind a hash. Without a hash the same work is done and the answer is no, so that the
 * time tells nobody whether an account exists (ASVS 5.0 6.3.8).
 */
export async function passwordMatches(passwordHash: string | null, password: string): Promise<boolean> {
  dummy ??= hashPassword('nobody has this password');
  const matches = await verify(passwordHash ?? (await dummy), stable(password));
  return passwordHash !== null && matches;
}
