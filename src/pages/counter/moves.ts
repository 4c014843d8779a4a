/** The acts that take lots from a place: what each is called, asks for, and sends. */
import type { AccountKind } from '../../../shared/book/account.ts';
import type { EventName } from '../../../shared/events/definition.ts';
import { orNull } from '../../forms/typed.ts';
import type { TypedAmount } from '../../components/domain/amount.tsx';
import { typedAmount } from '../../components/domain/amount.tsx';

export interface MoveValues {
  readonly from_id: string;
  readonly to_id: string;
  readonly party_id: string;
  readonly job_id: string;
  readonly operation: string;
  readonly choice: string;
  readonly reference: string;
  readonly note: string;
  readonly lots: readonly { readonly lot_id: string; readonly amount: TypedAmount }[];
}

export interface MoveDefinition {
  readonly title: string;
  readonly words: string;
  readonly act: string;
  readonly event: EventName;
  readonly from: readonly AccountKind[];
  /** Kinds of place that it may go to; none where it leaves the places. */
  readonly to: readonly AccountKind[];
  readonly party: 'customer' | 'any' | null;
  readonly choice: {
    readonly label: string;
    readonly options: readonly { readonly value: string; readonly label: string }[];
  } | null;
  readonly reference: string | null;
  readonly stated: boolean;
  readonly body: (values: MoveValues) => object;
}

const PLACES: readonly AccountKind[] = ['safe', 'bench', 'station', 'bin', 'outworker'];

const lines = (values: MoveValues) =>
  values.lots.map(({ lot_id, amount }, index) => ({
    lot_id,
    amount: typedAmount(amount, `lines.${index}.amount`),
  }));
const single = (values: MoveValues) => {
  const [first] = values.lots;
  return {
    lot_id: first?.lot_id ?? '',
    amount: first === undefined ? { how: 'all' } : typedAmount(first.amount, 'amount'),
  };
};
const common = (values: MoveValues) => ({ note: orNull(values.note) });

const plain = { to: [], party: null, choice: null, reference: null, stated: false } as const;

export const MOVES: Readonly<Record<string, MoveDefinition>> = {
  transfer: {
    ...plain,
    title: 'Transfer',
    words: 'From one place to another: a drawer, a tray, work handed on.',
    act: 'Post the transfer',
    event: 'transfer',
    from: PLACES,
    to: PLACES,
    body: (values) => ({
      ...common(values),
      from_id: values.from_id,
      to_id: values.to_id,
      job_id: orNull(values.job_id),
      operation: orNull(values.operation),
      lines: lines(values),
    }),
  },
  deliver: {
    ...plain,
    title: 'Deliver',
    words: 'Finished work to its customer, or metal sold.',
    act: 'Post the delivery',
    event: 'delivery',
    from: ['safe', 'bench'],
    party: 'customer',
    body: (values) => ({
      ...common(values),
      way: 'deliver',
      party_id: values.party_id,
      place_id: values.from_id,
      job_id: orNull(values.job_id),
      lines: lines(values),
    }),
  },
  approval: {
    ...plain,
    title: 'Out on approval, and back',
    words: 'Goods that a customer or agent takes to look at stay the house’s.',
    act: 'Post it',
    event: 'delivery',
    from: ['safe', 'bench'],
    party: 'customer',
    choice: {
      label: 'Which way',
      options: [
        { value: 'out_on_approval', label: 'Out on approval' },
        { value: 'back_from_approval', label: 'Back from approval' },
        { value: 'returned', label: 'Returned after delivery' },
      ],
    },
    body: (values) => ({
      ...common(values),
      way: values.choice,
      party_id: values.party_id,
      place_id: values.from_id,
      lines: lines(values),
    }),
  },
  'return-to-owner': {
    ...plain,
    title: 'Return to the owner',
    words: 'A customer’s or supplier’s own metal goes back.',
    act: 'Post the return',
    event: 'return-to-owner',
    from: ['safe', 'bench'],
    body: (values) => ({ ...common(values), place_id: values.from_id, ...single(values) }),
  },
  ownership: {
    ...plain,
    title: 'Change of owner',
    words: 'Metal stays where it is and belongs to somebody else. Two signatures.',
    act: 'Post the change of owner',
    event: 'ownership',
    from: PLACES,
    party: 'any',
    reference: 'What for',
    stated: true,
    body: (values) => ({
      ...common(values),
      place_id: values.from_id,
      new_owner_id: orNull(values.party_id),
      what_for: values.reference,
      job_id: orNull(values.job_id),
      ...single(values),
    }),
  },
  'use-up': {
    ...plain,
    title: 'Use up',
    words: 'Assay samples, plating laid on pieces.',
    act: 'Post the use',
    event: 'use-up',
    from: PLACES,
    stated: true,
    choice: {
      label: 'What for',
      options: [
        { value: 'assay_sample', label: 'Assay sample' },
        { value: 'plating', label: 'Plating' },
        { value: 'other', label: 'Other' },
      ],
    },
    reference: 'Reference',
    body: (values) => ({
      ...common(values),
      place_id: values.from_id,
      what_for: values.choice,
      reference: orNull(values.reference),
      ...single(values),
    }),
  },
  'write-off': {
    ...plain,
    title: 'Write off',
    words:
      'Theft, lost in transit, not recovered. Two signatures; the police or claim number stands beside it.',
    act: 'Post the write-off',
    event: 'write-off',
    from: [...PLACES, 'courier', 'refiner', 'approval'],
    stated: true,
    choice: {
      label: 'What became of it',
      options: [
        { value: 'theft', label: 'Theft' },
        { value: 'lost_in_transit', label: 'Lost in transit' },
        { value: 'not_recovered', label: 'Not recovered' },
      ],
    },
    reference: 'Police or claim number',
    body: (values) => ({
      way: 'from_place',
      job_id: orNull(values.job_id),
      place_id: values.from_id,
      cause: values.choice,
      number: orNull(values.reference),
      reason: values.note,
      lines: lines(values),
    }),
  },
};
