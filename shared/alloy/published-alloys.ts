/**
 * Compositions that are published, in parts per thousand by mass, each with its source and how sure it is. A workshop
 * may enter one in its own register, and changes it there. What each contains is computed from its parts, never taken
 * from its name: printed recipes often miss the carat they claim.
 */
import { Decimal } from '../decimal.ts';
import { METALS } from '../mass/vector.ts';
import type { Fineness } from './fineness.ts';
import { fineness } from './fineness.ts';
import type { PublishedSource } from './published-source.ts';
import { fromMemory, readIn } from './published-source.ts';

export const CONSTITUENTS = [...METALS, 'copper', 'zinc', 'nickel', 'iridium', 'other'] as const;
export type Constituent = (typeof CONSTITUENTS)[number];

/** From and to in parts per thousand; the same where one figure is published. */
export interface Share {
  readonly from: Decimal;
  readonly to: Decimal;
}

export interface PublishedAlloy {
  readonly name: string;
  readonly colour: string | null;
  readonly shares: Readonly<Partial<Record<Constituent, Share>>>;
  /** What the rest is, where the source gives no figure for it. */
  readonly balance: Constituent | null;
  readonly source: PublishedSource;
}

type Written = Readonly<Partial<Record<Constituent, string>>>;

/** "750" or "120-130" as a share. */
function share(text: string): Share {
  const [from = '0', to = from] = text.split('-');
  return { from: new Decimal(from), to: new Decimal(to) };
}

function alloys(
  source: PublishedSource,
  rows: readonly (readonly [name: string, colour: string | null, shares: Written, balance?: Constituent])[],
): readonly PublishedAlloy[] {
  return rows.map(([name, colour, written, balance]) => {
    const shares: Partial<Record<Constituent, Share>> = {};
    for (const constituent of CONSTITUENTS) {
      const text = written[constituent];
      if (text !== undefined) shares[constituent] = share(text);
    }
    return { name, colour, shares, balance: balance ?? null, source };
  });
}

const ISO_8654 = fromMemory(
  'ISO 8654, coloured golds; since 2018 defined by colour, so the table is indicative',
);
const ROSE = readIn('Rose, The Metallurgy of Gold, p. 49 Table XIII');
const HENLEY = readIn('Henley’s Twentieth Century Recipes, 1914, p. 435');
const GEE = readIn('Gee, The Silversmith’s Handbook, 5th ed. 1921, pp. 61–67');
const GEE_SOLDERS = readIn('Gee, The Silversmith’s Handbook, 5th ed. 1921, ch. VII');
const GENERAL = readIn('A general information table, of medium trust');
const LUMB = readIn('Lumb, The Platinum Metals, 1920');
const TRADE = fromMemory('Trade knowledge, no source');

export const PUBLISHED_ALLOYS: readonly PublishedAlloy[] = [
  ...alloys(ISO_8654, [
    ['0N', 'yellow-green', { gold: '585', silver: '300-340' }, 'copper'],
    ['1N', 'pale yellow', { gold: '585', silver: '240-265' }, 'copper'],
    ['2N', 'light yellow', { gold: '750', silver: '150-160' }, 'copper'],
    ['3N', 'yellow', { gold: '750', silver: '120-130' }, 'copper'],
    ['4N', 'rose', { gold: '750', silver: '85-95' }, 'copper'],
    ['5N', 'red', { gold: '750', silver: '45-55' }, 'copper'],
  ]),
  ...alloys(ROSE, [
    ['22 carat, Rose', 'yellow', { gold: '916.7', silver: '20', copper: '63.3' }],
    ['18 carat, Rose', 'yellow', { gold: '750', silver: '125', copper: '125' }],
    ['15 carat, Rose', null, { gold: '625', silver: '100', copper: '275' }],
    ['12 carat, Rose', null, { gold: '500', silver: '100', copper: '400' }],
    ['9 carat, Rose', null, { gold: '375', silver: '100', copper: '525' }],
  ]),
  // 15 dwt gold with 2 dwt 18 gr silver and 2 dwt 6 gr copper; with 1 dwt 18 gr and 3 dwt 6 gr: of 20 dwt each.
  ...alloys(HENLEY, [
    ['18 carat yellow, Henley', 'yellow', { gold: '750', silver: '137.5', copper: '112.5' }],
    ['18 carat red, Henley', 'red', { gold: '750', silver: '87.5', copper: '162.5' }],
  ]),
  ...alloys(GEE, [
    ['Sterling silver', 'white', { silver: '925', copper: '75' }],
    ['Sterling with a margin for the assay', 'white', { silver: '929.1666666667' }, 'copper'],
    ['Britannia with a margin for the assay', 'white', { silver: '962.5', copper: '37.5' }],
    ['Silver alloy No. 1', 'white', { silver: '900', copper: '100' }],
    ['Silver alloy No. 2', 'white', { silver: '800', copper: '200' }],
    ['Silver alloy No. 3', 'white', { silver: '750', copper: '250' }],
    ['Silver alloy No. 4', 'white', { silver: '700', copper: '300' }],
    ['Silver alloy No. 5', 'white', { silver: '675', copper: '325' }],
    ['Silver alloy No. 6', 'white', { silver: '650', copper: '350' }],
    ['Silver alloy No. 7', 'white', { silver: '625', copper: '375' }],
    ['Silver alloy No. 8', 'white', { silver: '600', copper: '400' }],
  ]),
  ...alloys(GEE_SOLDERS, [
    ['Silver solder, hard', 'white', { silver: '800', copper: '175', zinc: '25' }],
    ['Silver solder, medium', 'white', { silver: '750', copper: '200', zinc: '50' }],
    ['Silver solder, easy', 'white', { silver: '700', copper: '225', zinc: '75' }],
    ['Silver solder, common', 'white', { silver: '625', copper: '300', zinc: '75' }],
  ]),
  ...alloys(GENERAL, [
    ['9 carat yellow', 'yellow', { gold: '375', silver: '100', copper: '450', zinc: '75' }],
    ['14 carat yellow', 'yellow', { gold: '585', silver: '40', copper: '312', zinc: '63' }],
    ['18 carat yellow', 'yellow', { gold: '750', silver: '160', copper: '90' }],
    ['22 carat yellow', 'yellow', { gold: '917', silver: '55', copper: '28' }],
    ['18 carat white with palladium', 'white', { gold: '750', palladium: '170', silver: '40', copper: '40' }],
    ['18 carat red', 'red', { gold: '750', copper: '250' }],
    ['18 carat rose', 'rose', { gold: '750', copper: '222.5', silver: '27.5' }],
    ['18 carat soft green', 'green', { gold: '750', silver: '250' }],
    ['18 carat green', 'green', { gold: '750', silver: '200', copper: '50' }],
  ]),
  ...alloys(TRADE, [['Platinum 950', 'white', { platinum: '950', other: '50' }]]),
  ...alloys(LUMB, [['Platinum with a tenth of iridium', 'white', { platinum: '900', iridium: '100' }]]),
];

/** The four finenesses where each is published as one figure, or null where one of them is a range. */
export function finenessOfPublished({ shares }: PublishedAlloy): Fineness | null {
  const one = METALS.map((metal) => shares[metal] ?? share('0'));
  if (one.some(({ from, to }) => !from.eq(to))) return null;
  const [gold, silver, platinum, palladium] = one.map(({ from }) => from);
  return fineness({ gold, silver, platinum, palladium });
}
