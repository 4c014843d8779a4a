/**
 * The connection to PostgreSQL, and transactions that carry their workshop. The workshop is set for the transaction
 * and never for the connection, so that nothing of one workshop can be left behind for the next.
 */
import { QueryTypes, Sequelize } from 'sequelize';
import { z } from '../../shared/schemas/zod.ts';
import type { Bind, Tx } from './rows.ts';
import { txOver } from './rows.ts';

export interface Scope {
  readonly workshop_id: string | null;
  readonly user_id: string | null;
}

export interface Database {
  readonly sequelize: Sequelize;
  /** Runs one use case in one transaction, inside the wall of a workshop and as a signed-in user. */
  inScope<T>(scope: Scope, work: (tx: Tx) => Promise<T>): Promise<T>;
  /** One statement by itself, outside any workshop's wall: for what sets its own scope, and for health. */
  once<T>(schema: z.ZodType<T>, sql: string, bind?: Bind): Promise<T[]>;
  close(): Promise<void>;
}

/** Statements may take this long; a lock is waited for at most this long. */
const STATEMENT_TIMEOUT_MS = 30_000;
const LOCK_TIMEOUT_MS = 10_000;

/** Connects lazily; nothing is sent before the first query. `pool_size` is the most connections of this process. */
export function connect(url: string, pool_size = 10): Database {
  const sequelize = new Sequelize(url, {
    dialect: 'postgres',
    logging: false,
    pool: { max: pool_size, min: 0, acquire: 5_000, idle: 10_000 },
    dialectOptions: {
      statement_timeout: STATEMENT_TIMEOUT_MS,
      lock_timeout: LOCK_TIMEOUT_MS,
      idle_in_transaction_session_timeout: 60_000,
      connectionTimeoutMillis: 3_000,
      application_name: 'grainward',
    },
  });
  return {
    sequelize,
    inScope: (scope, work) =>
      sequelize.transaction(async (transaction) => {
        const tx = txOver(sequelize, transaction);
        await tx.rows(z.unknown(), SET_SCOPE, [scope.workshop_id ?? '', scope.user_id ?? '']);
        return work(tx);
      }),
    once: async (schema, sql, bind = []) =>
      z
        .array(schema)
        .parse(await sequelize.query(sql, { bind: [...bind], type: QueryTypes.SELECT, raw: true })),
    close: () => sequelize.close(),
  };
}

const SET_SCOPE = `SELECT set_config('grainward.workshop', $1, true), set_config('grainward.user', $2, true)`;
