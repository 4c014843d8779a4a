/**
 * Typed queries: every row that comes from PostgreSQL is parsed by a schema before the program sees it, and every
 * value goes there bound, never spliced into the text.
 */
import type { Sequelize, Transaction } from 'sequelize';
import { QueryTypes } from 'sequelize';
import type { z } from 'zod';
import { z as zod } from '../../shared/schemas/zod.ts';

export type Bind = readonly (string | number | boolean | null | Date | readonly string[])[];

/** The open transaction that a use case works in. */
export interface Tx {
  readonly transaction: Transaction;
  /** All rows of a query. Throws where a row is not of the schema: a fault of the program, not of its user. */
  rows<T>(schema: z.ZodType<T>, sql: string, bind?: Bind): Promise<T[]>;
  /** The first row, or null. */
  maybe<T>(schema: z.ZodType<T>, sql: string, bind?: Bind): Promise<T | null>;
  /** The one row. Throws where there is none. */
  one<T>(schema: z.ZodType<T>, sql: string, bind?: Bind): Promise<T>;
  /** A statement of which no row is wanted. */
  run(sql: string, bind?: Bind): Promise<void>;
}

/** Typed queries over an open Sequelize transaction. */
export function txOver(sequelize: Sequelize, transaction: Transaction): Tx {
  const raw = (sql: string, bind: Bind) =>
    sequelize.query(sql, { bind: [...bind], type: QueryTypes.SELECT, transaction, raw: true });
  const rows = async <T>(schema: z.ZodType<T>, sql: string, bind: Bind = []) =>
    zod.array(schema).parse(await raw(sql, bind));
  const maybe = async <T>(schema: z.ZodType<T>, sql: string, bind: Bind = []) =>
    (await rows(schema, sql, bind))[0] ?? null;
  return {
    transaction,
    rows,
    maybe,
    async one(schema, sql, bind = []) {
      const row = await maybe(schema, sql, bind);
      if (row === null) throw new Error(`a row was expected from: ${sql.slice(0, 80)}`);
      return row;
    },
    async run(sql, bind = []) {
      await raw(sql, bind);
    },
  };
}
