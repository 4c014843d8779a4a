/** What a migration is: a dated name and the SQL both ways. The list in `index.ts` is their order. */

export interface Migration {
  readonly name: string;
  readonly up: string;
  /** The way back; migrations that would lose records of the book have none and say so by null. */
  readonly down: string | null;
}

/**
 * SQL that puts a workshop's wall round a table: row-level security, forced on the owner too, by the workshop set
 * for the transaction (never for the connection).
 */
export function wallRound(table: string): string {
  return `
    ALTER TABLE ${table} ENABLE ROW LEVEL SECURITY;
    ALTER TABLE ${table} FORCE ROW LEVEL SECURITY;
    CREATE POLICY ${table}_of_workshop ON ${table}
      USING (workshop_id = current_workshop()) WITH CHECK (workshop_id = current_workshop());`;
}
