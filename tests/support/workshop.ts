/** A small invented workshop in the in-memory book: its people, places, parties and operations, by name. */
import { Book } from './book.ts';

/** A fresh workshop. The keeper is Mara, benches 2 and 4 are Corin's and Yusuf's; all are opened with nothing in them. */
export function aWorkshop() {
  const book = new Book();
  const hanna = book.person('Hanna Veit', 'proprietor');
  const mara = book.person('Mara Quist', 'keeper');
  const corin = book.person('Corin Dask', 'goldsmith');
  const yusuf = book.person('Yusuf Arden', 'goldsmith');
  const safe = book.place('safe', 'Safe', mara);
  const bench2 = book.place('bench', 'Bench 2', corin);
  const bench4 = book.place('bench', 'Bench 4', yusuf);
  const casting = book.place('station', 'Casting');
  const sweepsBin = book.place('bin', 'Sweeps bin', mara);
  const setterParty = book.party('outworker', 'Ilse Brand, setter');
  const setter = book.place('outworker', 'Ilse Brand', null, { party_id: setterParty });
  book.account('opening_stock', 'Opening stock');
  book.account('sold', 'Sold');
  book.account('count_variance', 'Count variance');
  book.account('assay_variance', 'Assay variance');
  book.account('processors_deduction', 'Processor’s deduction');
  book.account('used_up', 'Used up');
  book.account('written_off', 'Written off');
  book.account('foreign_matter', 'Foreign matter');
  for (const operation of [
    'sheet_work',
    'filing',
    'setting',
    'polishing',
    'soldering',
    'casting',
    'plating',
  ]) {
    book.account('working_loss', `Loss, ${operation.replace('_', ' ')}`, { operation });
  }
  const supplier = book.party('supplier', 'Aurel Metals');
  const customer = book.party('customer', 'Edda Lorn');
  const otherCustomer = book.party('customer', 'Tam Ruel');
  const approval = book.place('approval', 'Edda Lorn, on approval', null, { party_id: customer });
  const places = { safe, bench2, bench4, casting, sweepsBin, setter, approval };
  return { book, hanna, mara, corin, yusuf, ...places, setterParty, supplier, customer, otherCustomer };
}
