/** Who and what there is in the demo workshop. All of it is invented. */
import type { Role } from '../shared/permissions.ts';

export const WORKSHOP = {
  name: 'Tarn & Willet, Aldermoor',
  time_zone: 'Europe/Paris',
  currency: 'EUR',
} as const;

export interface CastMember {
  readonly key: 'proprietor' | 'keeper' | 'ines' | 'pavel' | 'mei' | 'auditor';
  readonly role: Role;
  readonly name: string;
  readonly email: string;
  readonly password: string;
  readonly pin: string | null;
}

/** The demo's own sign-ins, printed at the start; they exist in the demo workshop and nowhere else. */
export const CAST: readonly CastMember[] = [
  {
    key: 'proprietor',
    role: 'proprietor',
    name: 'Oriel Tarn',
    email: 'oriel@tarn-willet.example',
    password: 'heather anvil morning rope',
    pin: '2718',
  },
  {
    key: 'keeper',
    role: 'keeper',
    name: 'Bram Willet',
    email: 'bram@tarn-willet.example',
    password: 'lantern barley quiet stone',
    pin: '3141',
  },
  {
    key: 'ines',
    role: 'goldsmith',
    name: 'Ines Halloran',
    email: 'ines@tarn-willet.example',
    password: 'copper thistle river bench',
    pin: '1618',
  },
  {
    key: 'pavel',
    role: 'goldsmith',
    name: 'Pavel Rusk',
    email: 'pavel@tarn-willet.example',
    password: 'walnut ember slow harbour',
    pin: '1414',
  },
  {
    key: 'mei',
    role: 'goldsmith',
    name: 'Mei Corby',
    email: 'mei@tarn-willet.example',
    password: 'silver orchard window frost',
    pin: '1732',
  },
  {
    key: 'auditor',
    role: 'auditor',
    name: 'Sunna Dreyer',
    email: 'sunna@harrow-survey.example',
    password: 'ledger meadow amber bridge',
    pin: null,
  },
];

export const ALLOYS = [
  { name: '750 yellow', colour: 'yellow', gold_permille: '750', silver_permille: '125' },
  {
    name: '750 white, palladium',
    colour: 'white',
    gold_permille: '750',
    silver_permille: '100',
    palladium_permille: '150',
  },
  { name: '585 yellow', colour: 'yellow', gold_permille: '585', silver_permille: '265' },
  { name: '925 silver', colour: 'white', silver_permille: '925' },
  { name: '950 platinum', colour: 'white', platinum_permille: '950' },
  { name: 'Fine gold', colour: 'yellow', gold_permille: '999.9' },
] as const;

/** What each bench works in, at which operation, and how much of its worked metal it usually loses (per ten thousand). */
export const BENCHES = [
  { key: 'ines', place: 'Bench 1', alloy: '750 yellow', form: 'sheet', operation: 'sheet_work', loss: 38 },
  {
    key: 'pavel',
    place: 'Bench 2',
    alloy: '750 white, palladium',
    form: 'wire',
    operation: 'soldering',
    loss: 45,
  },
  { key: 'mei', place: 'Bench 3', alloy: '925 silver', form: 'sheet', operation: 'setting', loss: 52 },
] as const;
export type Bench = (typeof BENCHES)[number];

/** Euro per troy ounce on the first day; they drift from there. Invented, and said so as their source. */
export const PRICES = { gold: 3140, silver: 36, platinum: 1120, palladium: 980 } as const;
export const PRICE_SOURCE = 'demo prices, invented';

export const CUSTOMERS = [
  'Edda Marsh',
  'Tobias Fenn',
  'Corvin & Daughter, jewellers',
  'Lise Okonta',
  'Anselm Reed',
] as const;
export const PIECES = [
  'ring',
  'signet ring',
  'pair of earrings',
  'pendant',
  'brooch',
  'bangle',
  'pair of cufflinks',
  'chain',
] as const;
