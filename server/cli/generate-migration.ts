import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { DataSource } from 'typeorm';
import { ENTITIES } from '../db/entities';
import { MIGRATIONS } from '../db/migrations';

/**
 * Writes the migration that brings a migrated database to what the entities say.
 * Use: `npm run migration:generate -- AddSomething`, then add the class to `server/db/migrations/index.ts`.
 */
async function main(): Promise<void> {
  const name = process.argv[2];
  if (!name || !/^[A-Z][A-Za-z]+$/.test(name))
    throw new Error('Give the migration a name in capitals, such as AddCircuits.');
  const source = new DataSource({
    type: 'better-sqlite3',
    database: ':memory:',
    entities: ENTITIES,
    migrations: MIGRATIONS,
    migrationsRun: true,
  });
  await source.initialize();
  const { upQueries, downQueries } = await source.driver.createSchemaBuilder().log();
  await source.destroy();
  if (upQueries.length === 0) {
    console.log('The migrations already say what the entities say.');
    return;
  }
  const stamp = Date.now();
  const calls = (queries: { query: string }[]) =>
    queries.map(({ query }) => `    await runner.query(${JSON.stringify(query)});`).join('\n');
  const file = path.join(
    'server/db/migrations',
    `${stamp}-${name.replace(/(?<!^)([A-Z])/g, '-$1').toLowerCase()}.ts`,
  );
  writeFileSync(
    file,
    `import type { MigrationInterface, QueryRunner } from 'typeorm';

export class ${name}${stamp} implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
${calls(upQueries)}
  }

  async down(runner: QueryRunner): Promise<void> {
${calls([...downQueries].reverse())}
  }
}
`,
  );
  console.log(file);
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
