import type { EntityManager } from 'typeorm';

/** What stands where a name stood. */
const FORGOTTEN = '(erased)';

/**
 * Take a person's name out of the kept answers of an installation: refusals say it in words ("Ann K is confirmed already").
 * A repetition still gets its first answer, without the name.
 * @param name as people are shown it, such as `Ann K`
 * @returns how many answers were changed
 */
export async function forgetNameInAnswers(
  manager: EntityManager,
  installationId: string,
  name: string,
): Promise<number> {
  const rows = await manager.query<{ actor: string; key: string; reply: string }[]>(
    'SELECT actor, key, reply FROM idempotency WHERE installation_id = ? AND instr(reply, ?) > 0',
    [installationId, JSON.stringify(name).slice(1, -1)],
  );
  const whole = new RegExp(`(?<![\\p{L}\\p{N}])${escaped(name)}(?![\\p{L}\\p{N}])`, 'gu');
  let changed = 0;
  for (const row of rows) {
    const before = JSON.parse(row.reply) as unknown;
    const after = JSON.stringify(withoutName(before, whole));
    if (after === JSON.stringify(before)) continue;
    await manager.query('UPDATE idempotency SET reply = ? WHERE actor = ? AND key = ?', [
      after,
      row.actor,
      row.key,
    ]);
    changed += 1;
  }
  return changed;
}

function withoutName(value: unknown, name: RegExp): unknown {
  if (typeof value === 'string') return value.replace(name, FORGOTTEN);
  if (Array.isArray(value)) return value.map((entry) => withoutName(entry, name));
  if (value === null || typeof value !== 'object') return value;
  return Object.fromEntries(Object.entries(value).map(([key, entry]) => [key, withoutName(entry, name)]));
}

const escaped = (text: string): string => text.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');
