/**
 * What stays at a place for the night: an act without entries, for the night check. Metal still in hand is no loss; the
 * book holds it at the place, and this says what was seen of it, in pieces and grams or under which seal or lock.
 */
import type { Outcome, RecordDraft } from '../../book/draft.ts';
import { accept } from '../../book/draft.ts';
import { allOf } from '../../book/outcome.ts';
import { printGrams } from '../../mass/micrograms.ts';
import { netOf } from '../../weighing/weighing.ts';
import { weighingRows } from '../make-voucher.ts';
import type { WeighBackInput } from './schema.ts';
import type { Counter } from './weigh-back.ts';

/** The act `count_taken`, or none where nothing is said to stay. Refuses a weighing that can't be. */
export function overnight(input: WeighBackInput, counter: Counter): Outcome<readonly RecordDraft[]> {
  if (input.overnight.length === 0) return accept([]);
  const { facts, common, place, actor } = counter;
  const lines = allOf(
    input.overnight.map((line, index): Outcome<Readonly<Record<string, string | null>>> => {
      const { how, description, pieces } = line;
      const row = { line: String(index + 1), how, description, pieces: pieces?.toString() ?? null };
      if (line.how !== 'weighed') return accept({ ...row, net_g: null });
      const net = netOf(line.weighing, `overnight.${index}.weighing`);
      return net.ok ? accept({ ...row, net_g: printGrams(net.value) }) : net;
    }),
  );
  if (!lines.ok) return lines;
  const weighings = input.overnight.map((line, index) => ({
    weighing: line.how === 'weighed' ? line.weighing : null,
    line: index + 1,
  }));
  return accept([
    {
      type: 'act',
      id: facts.ids.id(),
      kind: 'count_taken',
      business_date: common.business_date,
      note: common.note,
      documents: [],
      detail: {
        what: 'overnight',
        account_id: place.id,
        bench: place.id,
        person_id: place.custodian_id,
        lines: lines.value,
        weighings: weighingRows(weighings, facts, actor),
      },
    },
  ]);
}
