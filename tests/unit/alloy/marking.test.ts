/** The mark is the next lower one; where nothing is published, that is what the answer says. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { MarkingPlace } from '../../../shared/alloy/marking-standards.ts';
import { MARKING_PLACES, markingStandard } from '../../../shared/alloy/marking-standards.ts';
import { checkMarking, chooseMark, needsMark } from '../../../shared/alloy/marking.ts';
import { finenessOf } from '../../../shared/alloy/fineness.ts';
import { Decimal } from '../../../shared/decimal.ts';
import { METALS, massVector } from '../../../shared/mass/vector.ts';

const PLACES: readonly MarkingPlace[] = [
  'united_kingdom',
  'convention',
  'finland',
  'united_states',
  'india',
  'india_later',
  'iso_9202',
];
const permille = fc.integer({ min: 0, max: 1_000_000 }).map((n) => new Decimal(n).div(1000));

describe('the mark that metal may bear', () => {
  it('never promises more than is there, and no higher mark would be true', () => {
    fc.assert(
      fc.property(permille, fc.constantFrom(...PLACES), fc.constantFrom(...METALS), (found, place, metal) => {
        const marks = markingStandard(place, metal)?.marks ?? [];
        const chosen = chooseMark(found, marks);
        if (chosen !== null) expect(chosen.permille.minus(found).lt('0.001')).toBe(true);
        for (const mark of marks)
          if (mark.permille.lte(found)) expect(chosen?.permille.gte(mark.permille)).toBe(true);
      }),
    );
  });

  it('is none below the least mark, and none of no list', () => {
    const gold = markingStandard('united_kingdom', 'gold')?.marks ?? [];
    expect(chooseMark(new Decimal('374.9'), gold)).toBeNull();
    expect(chooseMark(new Decimal(1000), [])).toBeNull();
  });

  it('is not lost to the microgram to which a mass is booked', () => {
    const booked = finenessOf(massVector({ gross: 12_345_679n, gold: 9_259_259n }))?.gold ?? new Decimal(0);
    expect(booked.lt(750)).toBe(true);
    const gold = markingStandard('united_kingdom', 'gold')?.marks ?? [];
    expect(chooseMark(booked, gold)?.mark).toBe('750');
    expect(chooseMark(new Decimal('749.999'), gold)?.mark).toBe('585');
  });
});

describe('a wanted mark', () => {
  const question = { place: 'united_kingdom', metal: 'gold', with_solder: false } as const;

  it('that is reached is told with who decides and what it rests on', () => {
    expect(checkMarking({ ...question, permille: new Decimal(588), mark: '585' })).toEqual({
      verdict: 'meets',
      reaches: '585',
      sentence: '588 gold reaches the mark 585 of the United Kingdom. The assay office decides.',
      sources: [
        { title: 'Hallmarking Convention, country profile of the United Kingdom', certainty: 'read' },
        { title: 'Hallmarking Act 1973 s. 1(4) as enacted', certainty: 'read' },
      ],
    });
  });

  it('that is out of reach of every mark gets none instead', () => {
    expect(checkMarking({ ...question, permille: new Decimal(300), mark: '375' })).toMatchObject({
      verdict: 'under',
      reaches: null,
      sentence:
        '300 gold is 75 under the mark 375, and the United Kingdom allows nothing under it. ' +
        'It reaches no mark for gold there. The assay office decides.',
    });
  });

  it('that the place doesn’t know is answered with those it does', () => {
    expect(checkMarking({ ...question, permille: new Decimal(800), mark: '800' })).toMatchObject({
      verdict: 'no_such_mark',
      reaches: '750',
      sentence:
        '800 is no mark for gold in the United Kingdom. The marks are 375, 585, 750, 916, 990, 999. The assay office decides.',
    });
  });

  it('for which nothing is published here is not judged', () => {
    const asked = { place: 'united_states', metal: 'palladium', mark: '950', with_solder: false } as const;
    expect(checkMarking({ ...asked, permille: new Decimal(950) })).toEqual({
      verdict: 'no_standard',
      reaches: null,
      sentence:
        'No published standard for palladium in the United States is kept here. The local authority decides.',
      sources: [],
    });
    expect(needsMark('united_states', 'palladium', 1n)).toBeNull();
  });
});

it('every published list rises, promises what it strikes, and names its source', () => {
  expect(Object.keys(MARKING_PLACES)).toEqual(PLACES);
  for (const place of PLACES) {
    for (const { marks, source, tolerance } of MARKING_PLACES[place].standards) {
      marks.slice(1).forEach((mark, index) => {
        expect(mark.permille.gt(marks[index]?.permille ?? 0)).toBe(true);
      });
      expect(marks.every(({ permille: promised }) => promised.gt(0) && promised.lte(1000))).toBe(true);
      expect([source.title, tolerance.source.title].every((title) => title.length > 4)).toBe(true);
      expect(tolerance.with_solder.gte(tolerance.free_of_solder)).toBe(true);
    }
  }
});
