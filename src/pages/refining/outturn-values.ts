/** What is typed of a refiner's statement, and the body of the event that it becomes. */
import { printGrams } from '../../../shared/mass/micrograms.ts';
import { readTypedMass } from '../../../shared/mass/typed-mass.ts';
import type { Metal } from '../../../shared/mass/vector.ts';
import { METALS } from '../../../shared/mass/vector.ts';
import { typedFigure, typedGrams, typedGramsOr } from '../../forms/typed.ts';
import type { Consignment, HeldLot } from './use-consignment.ts';

export interface TypedMetal {
  readonly assayed: string;
  readonly credited: string;
  readonly charge: string;
}

export interface TypedLine {
  /** Empty: all that lies there is settled. */
  readonly part: string;
  readonly after_melt: string;
  readonly metals: Readonly<Partial<Record<Metal, TypedMetal>>>;
}

export type PaymentWay = 'metal_account' | 'returned' | 'money';

export interface TypedPayment {
  readonly metal: Metal;
  readonly way: PaymentWay;
  readonly account_id: string;
  /** Empty: what the other payments leave of the metal's credit. */
  readonly mass: string;
  readonly amount: string;
}

export interface OutturnValues {
  readonly statement: string;
  readonly stage: string;
  readonly business_date: string;
  readonly lines: Readonly<Record<string, TypedLine>>;
  readonly payments: readonly TypedPayment[];
  readonly charges: readonly { readonly what: string; readonly amount: string }[];
}

export const noMetal: TypedMetal = { assayed: '', credited: '', charge: '' };
export const noLine: TypedLine = { part: '', after_melt: '', metals: {} };

export const noOutturn: OutturnValues = {
  statement: '',
  stage: 'settlement',
  business_date: '',
  lines: {},
  payments: [],
  charges: [],
};

const isTyped = (typed: TypedMetal | undefined): typed is TypedMetal =>
  typed !== undefined && (typed.assayed.trim() !== '' || typed.credited.trim() !== '');

const metalsOf = (line: TypedLine | undefined): readonly Metal[] =>
  METALS.filter((metal) => isTyped(line?.metals[metal]));

/** Lots of which anything is typed: only they are settled. */
export const settledLots = (values: OutturnValues, lots: readonly HeldLot[]): readonly HeldLot[] =>
  lots.filter(({ lot_id }) => metalsOf(values.lines[lot_id]).length > 0);

/** Micrograms of a metal that the typed statement credits, over all lots. */
export function creditedOf(values: OutturnValues, metal: Metal): bigint {
  return Object.values(values.lines).reduce((sum, line) => {
    const read = readTypedMass(line.metals[metal]?.credited ?? '');
    return sum + (read.ok ? read.ug : 0n);
  }, 0n);
}

/** Metals that are credited, in their order. */
export const creditedMetals = (values: OutturnValues): readonly Metal[] =>
  METALS.filter((metal) => creditedOf(values, metal) > 0n);

/** The payments as they count: one per credited metal where none was chosen yet, none for what isn't credited. */
export function paymentsOf(values: OutturnValues, account_id: string): readonly TypedPayment[] {
  return creditedMetals(values).flatMap((metal) => {
    const chosen = values.payments.filter((payment) => payment.metal === metal);
    return chosen.length > 0 ? chosen : [{ metal, way: 'metal_account', account_id, mass: '', amount: '' }];
  });
}

/** What a payment is: its own mass, or what the others of its metal leave. */
export function paidUg(
  payment: TypedPayment,
  payments: readonly TypedPayment[],
  values: OutturnValues,
): bigint {
  const own = readTypedMass(payment.mass);
  if (payment.mass.trim() !== '') return own.ok ? own.ug : 0n;
  const others = payments.filter((other) => other !== payment && other.metal === payment.metal);
  const named = others.reduce((sum, other) => {
    const read = readTypedMass(other.mass);
    return sum + (read.ok ? read.ug : 0n);
  }, 0n);
  const rest = creditedOf(values, payment.metal) - named;
  return rest > 0n ? rest : 0n;
}

/** The event's body. Throws TypedError where a figure can't be read. */
export function outturnBody(values: OutturnValues, consignment: Consignment, account_id: string) {
  const payments = paymentsOf(values, account_id);
  return {
    refiner_id: consignment.destination_id,
    consign_id: consignment.id,
    statement: values.statement,
    stage: values.stage,
    business_date: values.business_date === '' ? null : values.business_date,
    lines: settledLots(values, consignment.at_destination).map(({ lot_id }, at) =>
      lineBody(lot_id, values.lines[lot_id] ?? noLine, `lines.${at}`),
    ),
    payments: payments.map((payment) => ({
      way: payment.way,
      metal: payment.metal,
      mass_g: printGrams(paidUg(payment, payments, values)),
      ...(payment.way === 'metal_account' ? { account_id: payment.account_id } : {}),
      ...(payment.way === 'money' ? { amount: typedFigure(payment.amount) } : {}),
    })),
    charges: values.charges.map(({ what, amount }) => ({ what, amount: typedFigure(amount) })),
  };
}

function lineBody(lot_id: string, line: TypedLine, field: string) {
  return {
    lot_id,
    settle:
      line.part.trim() === ''
        ? { how: 'all' }
        : { how: 'part', gross_g: typedGrams(line.part, `${field}.settle.gross_g`) },
    after_melt_g: line.after_melt.trim() === '' ? null : typedGrams(line.after_melt, `${field}.after_melt_g`),
    metals: metalsOf(line).map((metal, at) => {
      const typed = line.metals[metal] ?? noMetal;
      return {
        metal,
        assayed_g: typedGrams(typed.assayed, `${field}.metals.${at}.assayed_g`),
        credited_g: typedGrams(typed.credited, `${field}.metals.${at}.credited_g`),
        charge_g: typedGramsOr(typed.charge, `${field}.metals.${at}.charge_g`, '0'),
      };
    }),
  };
}

/** Where the errors of a lot's metal stand in the body: its line and its place in it. */
export function fieldOf(
  values: OutturnValues,
  lots: readonly HeldLot[],
  lot_id: string,
  metal?: Metal,
): string {
  const line = settledLots(values, lots).findIndex((row) => row.lot_id === lot_id);
  if (metal === undefined) return `lines.${line}`;
  return `lines.${line}.metals.${metalsOf(values.lines[lot_id]).indexOf(metal)}`;
}
