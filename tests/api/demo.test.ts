import Database from 'better-sqlite3';
import { describe, expect, it } from 'vitest';
import { makeDemo } from '../support/demo';

/** What the demo holds, without ids and secrets. */
function contents(file: string) {
  const db = new Database(file, { readonly: true });
  const all = (sql: string) => db.prepare(sql).all();
  const found = {
    pieces: all('SELECT code, name FROM sub_assembly ORDER BY code'),
    steps: all(
      'SELECT code, step.position, step.state, step.started_at, step.finished_at FROM step JOIN sub_assembly ON sub_assembly.id = step.sub_assembly_id ORDER BY code, step.position',
    ),
    people: all('SELECT number, first_name, initial, age_band, confirmed_at FROM person ORDER BY number'),
    tools: all('SELECT number, name, tag IS NOT NULL AS tagged FROM tool ORDER BY number'),
    log: all('SELECT happened_at, action FROM day_log ORDER BY seq'),
  };
  db.close();
  return found;
}

describe('demo', () => {
  it(
    'seedDemo > made twice > a full hall, the same both times but for ids and secrets',
    { timeout: 120_000 },
    async () => {
      const [one, two] = [await makeDemo(), await makeDemo()];
      const [first, second] = [contents(one.config.DATABASE_FILE), contents(two.config.DATABASE_FILE)];
      one.remove();
      two.remove();
      expect(first.pieces.length).toBeGreaterThanOrEqual(24);
      expect(first.steps.length).toBeGreaterThanOrEqual(180);
      expect(first.people.length).toBeGreaterThanOrEqual(30);
      expect(first.tools.length).toBeGreaterThanOrEqual(30);
      expect(
        new Set(first.steps.map((step) => (step as { state: string }).state)).size,
      ).toBeGreaterThanOrEqual(6);
      expect(second).toEqual(first);
    },
  );
});
