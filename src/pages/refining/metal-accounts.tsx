/** Metal accounts with refiners, suppliers and casting houses: what each stands at, its limit, and what is done on it. */
import { Link } from 'react-router-dom';
import type { Facts } from '../../../shared/book/facts.ts';
import { claimOf, standingLotId } from '../../../shared/events/refining/standing-lot.ts';
import type { Metal } from '../../../shared/mass/vector.ts';
import { METALS } from '../../../shared/mass/vector.ts';
import { Page, Section } from '../../components/ui/page.tsx';
import { MetalKey } from '../../components/ui/metal-key.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { ugFigure } from '../../lib/formats.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { paths } from '../../app/paths.ts';
import { RefiningNav } from './nav.tsx';
import { SettleForm } from './settle-form.tsx';

export function MetalAccountsPage() {
  const { can } = useSession();
  const accounts = useAccounts().filter(({ kind, closed }) => kind === 'metal_account' && !closed);
  const facts = useFacts({ place_ids: accounts.map(({ id }) => id) });
  return (
    <Page
      title="Metal accounts"
      lede="Claims, not metal in hand."
      nav={<RefiningNav />}
      margin={<p>Below nothing the house owes, to the limit agreed with the party and no further.</p>}
    >
      <Section heading="What they stand at" notes={<p>Each opens its vouchers.</p>}>
        <Balances facts={facts} ids={accounts.map(({ id }) => id)} />
      </Section>
      {can('book.settle') && accounts.length > 0 ? <SettleForm facts={facts} /> : null}
    </Page>
  );
}

interface Row {
  readonly account_id: string;
  readonly name: string;
  readonly metal: Metal;
  readonly claim: bigint;
  readonly limit: bigint;
}

function rowsOf(facts: Facts, ids: readonly string[]): readonly Row[] {
  return ids.flatMap((account_id) =>
    METALS.flatMap((metal) => {
      const limit =
        facts.settings.claim_limits.find((row) => row.account_id === account_id && row.metal === metal)
          ?.limit_ug ?? 0n;
      if (standingLotId(facts, account_id, metal) === null && limit === 0n) return [];
      const name = facts.accounts.get(account_id)?.name ?? 'account';
      return [{ account_id, name, metal, claim: claimOf(facts, account_id, metal), limit }];
    }),
  );
}

function Balances({ facts, ids }: { readonly facts: Facts; readonly ids: readonly string[] }) {
  return (
    <RegisterTable
      caption="Balances of the metal accounts"
      rows={rowsOf(facts, ids)}
      rowKey={(row) => `${row.account_id}${row.metal}`}
      empty={ids.length === 0 ? 'There is no metal account yet.' : 'No metal stands on any account.'}
      emptyWords={
        ids.length === 0
          ? 'One is opened under Workshop, places, for a refiner, supplier or casting house.'
          : 'An outturn that is credited, or metal that is drawn, shows here.'
      }
      csv="metal-accounts"
      columns={[
        {
          id: 'account',
          head: 'Account',
          cell: (row) => <Link to={`${paths.vouchers}?account_id=${row.account_id}`}>{row.name}</Link>,
          value: (row) => row.name,
        },
        {
          id: 'metal',
          head: 'Metal',
          cell: (row) => <MetalKey metal={row.metal} />,
          value: (row) => row.metal,
        },
        {
          id: 'claim_ug',
          head: 'Stands at, g fine',
          figure: 'fine',
          cell: (row) => (
            <span className={row.claim < 0n ? 'rouge' : ''}>
              {ugFigure(row.claim)}
              {row.claim < 0n ? <small className="block">the house owes</small> : null}
            </span>
          ),
          value: (row) => row.claim.toString(),
        },
        {
          id: 'limit_ug',
          head: 'May owe, g',
          figure: 'gross',
          cell: (row) => (row.limit === 0n ? <span className="none">none</span> : ugFigure(row.limit)),
          value: (row) => row.limit.toString(),
        },
      ]}
    />
  );
}
