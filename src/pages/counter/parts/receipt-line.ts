/** A line of a delivery as it is typed, and as it is sent. */
import type { TypedWeighing } from '../../../forms/typed.ts';
import { noWeighing, orNull, typedFigure, typedGramsOr, typedWeighing } from '../../../forms/typed.ts';

export interface ReceiptLine {
  readonly form: string;
  readonly description: string;
  readonly alloy: string;
  readonly basis: string;
  readonly origin: string;
  readonly owner: 'house' | 'party';
  readonly gold: string;
  readonly silver: string;
  readonly platinum: string;
  readonly palladium: string;
  readonly pieces: string;
  readonly invoice: string;
  readonly weighing: TypedWeighing;
  readonly decision: '' | 'accept' | 'claim' | 'send_back';
}

export const emptyLine: ReceiptLine = {
  form: 'grain',
  description: '',
  alloy: '',
  basis: 'certificate',
  origin: 'undeclared',
  owner: 'house',
  gold: '',
  silver: '',
  platinum: '',
  palladium: '',
  pieces: '',
  invoice: '',
  weighing: noWeighing,
  decision: '',
};

const permille = (text: string) => (text.trim() === '' ? '0' : typedFigure(text));

/** The lot's own fields of a body, as every event that makes a lot by hand asks for them. */
export function newLotBody(line: ReceiptLine, owner_id: string | null) {
  return {
    form: line.form,
    alloy: orNull(line.alloy),
    description: line.description,
    owner_id,
    origin: line.origin,
    basis: line.basis,
    gold_permille: permille(line.gold),
    silver_permille: permille(line.silver),
    platinum_permille: permille(line.platinum),
    palladium_permille: permille(line.palladium),
    pieces: orNull(line.pieces),
  };
}

/** A line of the weigh-in's body; `field` is its path. */
export function lineBody(line: ReceiptLine, field: string, party_id: string) {
  const invoice = typedGramsOr(line.invoice, `${field}.invoice_gross_g`, '');
  return {
    ...newLotBody(line, line.owner === 'party' ? party_id : null),
    invoice_gross_g: orNull(invoice),
    weighing: typedWeighing(line.weighing, `${field}.weighing`),
    decision: orNull(line.decision),
  };
}
