/**
 * Brings a database to the schema that this program is written for. Runs as the owner; an advisory lock keeps two
 * starts apart, and each migration is one transaction, so that one killed half-way is simply run again.
 */
import { Sequelize } from 'sequelize';
import type { Transaction } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { migrations } from '../migrations/index.ts';
import type { Migration } from '../migrations/migration.ts';

const MIGRATION_LOCK = 4_180_001;

/** Runs every migration that is missing. `owner_url` is the role that owns the tables; the program's role must exist. */
export async function migrate(owner_url: string): Promise<void> {
  const sequelize = new Sequelize(owner_url, { dialect: 'postgres', logging: false, pool: { max: 2 } });
  try {
    await sequelize.transaction(async (lock) => {
      await sequelize.query('SELECT pg_advisory_xact_lock($1)', {
        bind: [MIGRATION_LOCK],
        transaction: lock,
      });
      const umzug = new Umzug({
        migrations: migrations.map((migration) => runnable(sequelize, migration)),
        storage: new SequelizeStorage({ sequelize, tableName: 'schema_migration' }),
        logger: undefined,
      });
      await umzug.up();
      await sequelize.query('GRANT SELECT ON schema_migration TO grainward_app');
    });
  } finally {
    await sequelize.close();
  }
}

function runnable(sequelize: Sequelize, migration: Migration) {
  const inTransaction = (sql: string) =>
    sequelize.transaction(async (transaction: Transaction) => {
      await sequelize.query(sql, { transaction });
    });
  return {
    name: migration.name,
    up: () => inTransaction(migration.up),
    down: async () => {
      if (migration.down === null)
        throw new Error(`${migration.name} has no way back: it would lose records.`);
      await inTransaction(migration.down);
    },
  };
}
