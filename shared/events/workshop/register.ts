/** What the workshop keeps in registers: alloys, prices, allowances, jobs. Every change is an act of the chain. */
import { accept, refuse } from '../../book/draft.ts';
import { isPossibleFineness } from '../../alloy/fineness.ts';
import { METALS } from '../../mass/vector.ts';
import { printGrams } from '../../mass/micrograms.ts';
import {
  businessDate,
  gramsOrNone,
  id,
  money,
  percent,
  permille,
  shortText,
} from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import type { EventDefinition } from '../definition.ts';
import { recordsOnly } from '../definition.ts';
import { act } from './act.ts';

const alloySchema = z.strictObject({
  alloy_id: id.nullable().default(null),
  name: shortText,
  gold_permille: permille,
  silver_permille: permille,
  platinum_permille: permille,
  palladium_permille: permille,
  colour: shortText.nullable().default(null),
  source: shortText.nullable().default(null),
  retired: z.boolean().default(false),
});

/** Enters an alloy in the register, or changes it. Refuses metals that add to more than the whole. */
export const setAlloy: EventDefinition<z.output<typeof alloySchema>> = {
  name: 'set-alloy',
  schema: alloySchema,
  action: 'alloy.set',
  summary: 'Enters or changes an alloy of the register.',
  needs: () => ({}),
  draft(input, facts) {
    const { gold_permille, silver_permille, platinum_permille, palladium_permille } = input;
    const fineness = {
      gold: gold_permille,
      silver: silver_permille,
      platinum: platinum_permille,
      palladium: palladium_permille,
    };
    if (!isPossibleFineness(fineness)) {
      const sentence = 'The metals add to more than 1000. Look at the figures again.';
      return refuse({ code: 'invalid', field: 'gold_permille', sentence });
    }
    const detail = {
      alloy_id: input.alloy_id ?? facts.ids.id(),
      name: input.name,
      gold_permille: gold_permille.toFixed(),
      silver_permille: silver_permille.toFixed(),
      platinum_permille: platinum_permille.toFixed(),
      palladium_permille: palladium_permille.toFixed(),
      colour: input.colour,
      source: input.source,
      retired: input.retired ? 'yes' : 'no',
    };
    return accept(recordsOnly([act('alloy_set', detail, facts)]));
  },
};

const priceSchema = z.strictObject({
  prices: z
    .array(
      z.strictObject({
        metal: z.enum(METALS),
        price_per_ozt: money.refine((p) => p.gt(0), 'A price is more than nothing.'),
      }),
    )
    .min(1)
    .max(4),
  priced_on: businessDate,
  source: shortText,
});

/** Sets the day's prices per troy ounce in the workshop's currency, with their source. */
export const setPrice: EventDefinition<z.output<typeof priceSchema>> = {
  name: 'set-price',
  schema: priceSchema,
  action: 'price.set',
  summary: 'Sets metal prices of a day, per troy ounce, with their source.',
  needs: () => ({}),
  draft(input, facts) {
    if (input.priced_on > facts.today) {
      return refuse({
        code: 'date_ahead',
        field: 'priced_on',
        sentence: 'That day has not come yet. Enter today or an earlier day.',
      });
    }
    const acts = input.prices.map(({ metal, price_per_ozt }) =>
      act(
        'price_set',
        {
          price_id: facts.ids.id(),
          metal,
          currency: facts.settings.currency,
          price_per_ozt: price_per_ozt.toFixed(),
          priced_on: input.priced_on,
          source: input.source,
        },
        facts,
      ),
    );
    return accept(recordsOnly(acts));
  },
};

const allowanceSchema = z.strictObject({
  operation: shortText,
  alloy: shortText.nullable().default(null),
  percent,
  fixed_g: gramsOrNone,
  from: businessDate,
});

/** Sets what an operation may lose: a percentage of worked metal and a fixed mass, from a date on. */
export const setAllowance: EventDefinition<z.output<typeof allowanceSchema>> = {
  name: 'set-allowance',
  schema: allowanceSchema,
  action: 'allowance.set',
  summary: 'Sets the loss that an operation is allowed, from a date on.',
  needs: () => ({}),
  draft(input, facts) {
    if (![...facts.accounts.values()].some((account) => account.operation === input.operation)) {
      return refuse({
        code: 'invalid',
        field: 'operation',
        sentence: 'There is no such operation. Open it first.',
      });
    }
    const detail = {
      allowance_id: facts.ids.id(),
      operation: input.operation,
      alloy: input.alloy,
      percent: input.percent.toFixed(),
      fixed_g: printGrams(input.fixed_g),
      from: input.from,
    };
    return accept(recordsOnly([act('allowance_set', detail, facts)]));
  },
};

const jobSchema = z.strictObject({
  code: shortText,
  title: shortText,
  customer_id: id.nullable().default(null),
});

/** Opens a job, for a customer or for stock. */
export const openJob: EventDefinition<z.output<typeof jobSchema>> = {
  name: 'open-job',
  schema: jobSchema,
  action: 'job.open',
  summary: 'Opens a job that metal is issued to.',
  needs: (input) => ({ party_ids: input.customer_id === null ? [] : [input.customer_id] }),
  draft(input, facts) {
    if (input.customer_id !== null && facts.parties.get(input.customer_id)?.kind !== 'customer') {
      return refuse({
        code: 'invalid',
        field: 'customer_id',
        sentence: 'That customer is not in the book. Enter the customer first.',
      });
    }
    return accept(recordsOnly([act('job_opened', { job_id: facts.ids.id(), ...input }, facts)]));
  },
};
