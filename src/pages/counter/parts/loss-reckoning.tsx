/** The loss of a job, judged: the figure, the index plate against its allowance, the word, what was worked. */
import type { VoucherDraft } from '../../../../shared/book/draft.ts';
import type { Facts } from '../../../../shared/book/facts.ts';
import { FINDINGS, FINDING_WORDS } from '../../../../shared/loss/judgement.ts';
import { lossPercent } from '../../../../shared/loss/allowance.ts';
import { valueOf } from '../../../../shared/insurance/valuation.ts';
import { METALS, ZERO_MASS, addMass } from '../../../../shared/mass/vector.ts';
import { gramsText } from '../../../../shared/mass/grams-text.ts';
import { printGrams } from '../../../../shared/mass/micrograms.ts';
import { Figure, LabelledFigure } from '../../../components/ui/figure.tsx';
import { IndexPlate } from '../../../components/ui/index-plate.tsx';
import { metalName } from '../../../components/ui/metal-key.tsx';
import { StatusWord } from '../../../components/ui/status-word.tsx';
import { moneyText, ugFigure } from '../../../lib/formats.ts';

const leaf = (voucher: VoucherDraft, key: string): string | null => {
  const value = voucher.detail[key];
  return typeof value === 'string' ? value : null;
};

export function LossReckoning({ voucher, facts }: { readonly voucher: VoucherDraft; readonly facts: Facts }) {
  const metal = METALS.find((known) => known === leaf(voucher, 'judged_metal')) ?? 'gold';
  const losses = voucher.entries.filter(
    (entry) => facts.accounts.get(entry.account_id)?.kind === 'working_loss',
  );
  const loss = losses.reduce((sum, entry) => addMass(sum, entry.mass), ZERO_MASS);
  const worked = gramsText(leaf(voucher, `worked_${metal}_g`) ?? '0');
  const allowance = leaf(voucher, 'allowance_g');
  const limit = leaf(voucher, 'limit_of_error_g') ?? '0';
  const finding = FINDINGS.find((known) => known === leaf(voucher, 'finding')) ?? 'no_allowance';
  const percent = lossPercent(loss[metal], worked);
  const value = valueOf(loss, facts.prices);
  return (
    <div className="figures">
      <LabelledFigure
        label={`Working loss, fine ${metalName(metal).toLowerCase()}`}
        under={`${percent === null ? '' : `${percent.toFixed(2)} % of ${ugFigure(worked)} g worked`}${value === null ? '' : `, ${moneyText(value.toFixed(2), facts.settings.currency, true)}`}`}
      >
        <Figure
          size={1}
          text={ugFigure(loss[metal])}
          unit="g"
          rouge={finding === 'over_allowance' || finding === 'more_back'}
        />
      </LabelledFigure>
      <div className="min-w-[280px] flex-1">
        {allowance === null ? null : (
          <IndexPlate
            value={Number.parseFloat(printGrams(loss[metal]))}
            limit={Number.parseFloat(allowance)}
            limitName={`allowance ${ugFigure(gramsText(allowance))}`}
            finding={`Loss of ${ugFigure(loss[metal])} g, allowance ${ugFigure(gramsText(allowance))} g: ${FINDING_WORDS[finding]}`}
          />
        )}
        <p className="m-0 flex flex-wrap gap-4">
          <StatusWord status={FINDING_WORDS[finding]} />
          <span className="text-ink-2">
            Limit of error {'\u00B1'}
            {ugFigure(gramsText(limit))} g.
          </span>
        </p>
      </div>
    </div>
  );
}
