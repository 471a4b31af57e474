import type Database from 'better-sqlite3';
import { DataSource, type DataSourceOptions } from 'typeorm';
import { ENTITIES } from './entities';
import { MIGRATIONS } from './migrations';

type SqliteOptions = Extract<DataSourceOptions, { type: 'better-sqlite3' }>;

/** The file's two connections: one that writes, one that can only read what is committed. */
export interface DataSources {
  writer: DataSource;
  reader: DataSource;
  /** The reader's own handle, for several reads in one synchronous transaction. */
  readHandle: Database.Database;
  close(): Promise<void>;
}

const base = (file: string): SqliteOptions => ({
  type: 'better-sqlite3',
  database: file,
  entities: ENTITIES,
  enableWAL: true,
  // TypeORM leaves `synchronous` at NORMAL from the second start on; an acknowledged claim must survive a power cut.
  prepareDatabase: (db: Database.Database) => {
    db.pragma('synchronous = FULL');
    db.pragma('busy_timeout = 5000');
  },
});

/**
 * Open the database file, migrate it, then open the read-only connection (which throws on a file without tables).
 * @param file path of the SQLite file; made when missing
 */
export async function openDataSources(file: string): Promise<DataSources> {
  const writer = new DataSource({
    ...base(file),
    migrations: MIGRATIONS,
    migrationsRun: true,
    migrationsTransactionMode: 'each',
  });
  await writer.initialize();
  const reader = new DataSource({ ...base(file), enableWAL: false, readonly: true });
  await reader.initialize();
  const readHandle = (reader.driver as unknown as { databaseConnection: Database.Database })
    .databaseConnection;
  return {
    writer,
    reader,
    readHandle,
    close: async () => {
      await reader.destroy();
      await writer.destroy();
    },
  };
}
