/** Lots that lie at a place as options of a field, with what is there. */
import type { Facts } from '../../../shared/book/facts.ts';
import { ugFigure } from '../../lib/formats.ts';
import type { Option } from '../ui/select-field.tsx';

export function lotOptions(facts: Facts, place_id: string): readonly Option[] {
  return facts.holdings
    .filter((held) => held.account_id === place_id && held.mass.gross > 0n)
    .map((held) => ({ held, lot: facts.lots.get(held.lot_id) }))
    .flatMap(({ held, lot }) =>
      lot === undefined
        ? []
        : [
            {
              value: lot.id,
              label: `${lot.code} ${lot.description}, ${ugFigure(held.mass.gross)} g${lot.standing === 'on_hold' ? ', on hold' : ''}`,
            },
          ],
    );
}
