/** Provisional ids for previews: they name what a draft would open and never reach the server. */
import type { IdSource } from '../../shared/book/facts.ts';
import { makeLotCode } from '../../shared/book/lot-code.ts';

/** Ids and codes for one preview; the real ones are the server's. */
export function provisionalIds(today: string, lot_serial: string): IdSource {
  let serial = BigInt(lot_serial);
  return {
    id: () => crypto.randomUUID(),
    lotCode: (letter) => {
      serial += 1n;
      return makeLotCode(letter, today.slice(2, 4), serial);
    },
  };
}
