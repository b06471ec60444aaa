import type { QueryInterface } from 'sequelize';
import { SequelizeStorage, Umzug, type RunnableMigration } from 'umzug';
import { createDatabase } from '@/server/adapters/database/database';
import * as createFirstTables from '@/server/migrations/20261201120000-create-first-tables';

// Listed by hand: the bundled server has no folder to look into.
const migrations: RunnableMigration<QueryInterface>[] = [
  { name: '20261201120000-create-first-tables', up: createFirstTables.up, down: createFirstTables.down },
];

/**
 * Brings the database to the newest schema.
 * @returns names of the migrations that were run, oldest first
 */
export async function migrate(databaseUrl: string): Promise<string[]> {
  const database = createDatabase(databaseUrl, 2);
  try {
    return await database.transaction(async () => {
      // Two servers that start together must not both run a migration.
      await database.query('SELECT pg_advisory_xact_lock(727001)');
      const umzug = new Umzug({
        migrations, context: database.getQueryInterface(), storage: new SequelizeStorage({ sequelize: database }), logger: undefined,
      });
      return (await umzug.up()).map((migration) => migration.name);
    });
  } finally {
    await database.close();
  }
}
