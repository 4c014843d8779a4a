/** A workshop that sends sweeps to a refiner: courier, refiner, metal accounts, and a bin with its rates. */
import { Decimal } from '../../shared/decimal.ts';
import { aWorkshop } from './workshop.ts';

export function aRefinersWorkshop() {
  const workshop = aWorkshop();
  const { book } = workshop;
  const refinerParty = book.party('refiner', 'Norrby Refining');
  const refiner = book.place('refiner', 'Norrby Refining', null, { party_id: refinerParty });
  const metalAccount = book.account('metal_account', 'Norrby, metal account', { party_id: refinerParty });
  const courierParty = book.party('courier', 'Valois Secure');
  const courier = book.place('courier', 'Valois Secure', null, { party_id: courierParty });
  return { ...workshop, refinerParty, refiner, metalAccount, courier };
}

/** Says that a bin takes an operation's loss, and what share per metal is expected back, in percent. */
export function feed(
  workshop: ReturnType<typeof aRefinersWorkshop>,
  operation: string,
  percent: { readonly gold?: string; readonly silver?: string },
  bench_id: string | null = null,
): void {
  const of = (value = '0') => new Decimal(value);
  const rate_percent = {
    gold: of(percent.gold),
    silver: of(percent.silver),
    platinum: of(),
    palladium: of(),
  };
  workshop.book.state.bin_feeds.push({ bin_id: workshop.sweepsBin, operation, bench_id, rate_percent });
}

const SEAL = { seal: '004417', content: 'Sweeps' };

/** Bodies of the events of a lot's way to the refiner. */
export function way(workshop: ReturnType<typeof aRefinersWorkshop>, lot_id: string, from_id = workshop.safe) {
  const { courier, refiner } = workshop;
  return {
    consign: {
      code: 'C-0031',
      from_id,
      courier_id: courier,
      destination_id: refiner,
      lines: [{ lot_id, amount: { how: 'all' } }],
      packages: [SEAL],
    },
    arrive: (consign_id: string, received_g: string) => ({ consign_id, lines: [{ lot_id, received_g }] }),
    outturn: (metals: readonly object[], payments: readonly object[], settle: object = { how: 'all' }) => ({
      refiner_id: refiner,
      statement: 'S-2206',
      lines: [{ lot_id, settle, metals }],
      payments,
    }),
  };
}
