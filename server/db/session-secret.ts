import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';

/**
 * The secret that signs session cookies, kept beside the database so that a restart signs nobody out.
 * @param databaseFile path of the database; the secret stands in `<file>.secret`, readable by its owner only
 */
export function sessionSecret(databaseFile: string): string {
  const file = `${databaseFile}.secret`;
  if (existsSync(file)) return readFileSync(file, 'utf8').trim();
  const secret = randomBytes(32).toString('base64url');
  writeFileSync(file, `${secret}\n`, { mode: 0o600 });
  return secret;
}
