/** A workshop set up over HTTP, with places, parties and prices, for tests that work a day at its counter. */
import { z } from 'zod';
import type { Person } from './server.ts';

const rows = z.object({ rows: z.array(z.object({ id: z.string(), kind: z.string(), name: z.string() })) });
const people = z.object({ people: z.array(z.object({ id: z.string(), name: z.string() })) });
const holding = z.object({
  account_id: z.string(),
  lot_id: z.string(),
  gross_g: z.string(),
  gold_g: z.string(),
  silver_g: z.string(),
});

export interface HttpWorkshop {
  /** Id of the account of a kind, by its name where there are several. */
  account(kind: string, name?: string): Promise<string>;
  person(name: string): Promise<string>;
  party(kind: string, name: string): Promise<string>;
  openPlace(
    kind: string,
    name: string,
    custodian_id?: string | null,
    party_id?: string | null,
  ): Promise<string>;
  job(code: string, customer_id?: string | null): Promise<string>;
  /** "gross gold" in grams of a lot in a place, or "none". */
  held(account_id: string, lot_id: string): Promise<string>;
}

export function httpWorkshop(by: Person): HttpWorkshop {
  const find = async (kind: string, name?: string) => {
    const accounts = rows.parse((await by.get('/accounts')).body).rows;
    const found = accounts.find((a) => a.kind === kind && (name === undefined || a.name === name));
    if (found === undefined) throw new Error(`no ${kind} ${name ?? ''}`);
    return found.id;
  };
  const opened = z.object({
    detail: z.object({
      account_id: z.string().optional(),
      party_id: z.string().nullish(),
      job_id: z.string().optional(),
    }),
  });
  const lastDetail = async (sequence: string) =>
    opened.parse((await by.get(`/vouchers/${sequence}`)).body).detail;
  return {
    account: (kind, name) => find(kind, name),
    async person(name) {
      const found = people.parse((await by.get('/people')).body).people.find((p) => p.name === name);
      if (found === undefined) throw new Error(`nobody is called ${name}`);
      return found.id;
    },
    async party(kind, name) {
      const { records } = await by.record('set-party', { kind, name });
      return (await lastDetail(records[0]?.sequence ?? '')).party_id ?? '';
    },
    async openPlace(kind, name, custodian_id = null, party_id = null) {
      const { records } = await by.record('open-place', { kind, name, custodian_id, party_id });
      return (await lastDetail(records[0]?.sequence ?? '')).account_id ?? '';
    },
    async job(code, customer_id = null) {
      const { records } = await by.record('open-job', { code, title: code, customer_id });
      return (await lastDetail(records[0]?.sequence ?? '')).job_id ?? '';
    },
    async held(account_id, lot_id) {
      const body = z
        .object({ holdings: z.array(holding) })
        .parse((await by.post('/facts', { lot_ids: [lot_id] })).body);
      const row = body.holdings.find((h) => h.account_id === account_id);
      return row === undefined ? 'none' : `${row.gross_g} ${row.gold_g}`;
    },
  };
}
