/** A lot: form mark, code, check character lighter, a few words. Always a link. */
import { Link } from 'react-router-dom';
import type { LotForm } from '../../../shared/book/lot.ts';
import type { IconName } from '../ui/icon.tsx';
import { Icon } from '../ui/icon.tsx';

const FORM_ICONS: Readonly<Record<LotForm, IconName>> = {
  grain: 'grain',
  bar: 'bar',
  sheet: 'sheet',
  wire: 'wire',
  tube: 'wire',
  solder: 'grain',
  findings: 'work',
  casting: 'melt',
  tree_scrap: 'scrap',
  work: 'work',
  finished_work: 'work',
  clean_scrap: 'scrap',
  filings: 'filings',
  polishings: 'sweeps',
  sweeps: 'sweeps',
  sludge: 'sweeps',
  plating_salts: 'melt',
  old_gold: 'scrap',
  other_precious: 'grain',
  account: 'book',
};

export const formIcon = (form: LotForm): IconName => FORM_ICONS[form];

/** A code with its check character in a lighter weight. */
export function LotCode({ code }: { readonly code: string }) {
  const at = code.lastIndexOf('-');
  return (
    <>
      <b>{code.slice(0, at)}</b>
      <span className="check-char">{code.slice(at)}</span>
    </>
  );
}

interface LotChipProps {
  readonly id: string;
  readonly code: string;
  readonly form: LotForm;
  readonly description: string;
  readonly standing?: string;
  readonly owner?: string | null;
}

export function LotChip({ id, code, form, description, standing, owner }: LotChipProps) {
  const held = standing === 'on_hold';
  return (
    <span className="chip-wrap">
      <Link className={`chip ${standing ?? ''}`} to={`/lots/${id}`}>
        <Icon name={held ? 'hold' : formIcon(form)} size={16} />
        <span>
          <LotCode code={code} /> {description}
          {held ? ', on hold' : standing === 'spent' ? ', spent' : ''}
          {owner ? `, ${owner}` : ''}
        </span>
      </Link>
    </span>
  );
}
