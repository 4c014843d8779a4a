/** Places as options of a field, by their kinds. */
import type { AccountKind } from '../../../shared/book/account.ts';
import type { AccountRow } from '../../../shared/schemas/registers.ts';
import type { Option } from '../ui/select-field.tsx';

/** Open places of the kinds, with who answers for them. */
export function placeOptions(
  accounts: readonly AccountRow[],
  kinds: readonly AccountKind[],
): readonly Option[] {
  return accounts
    .filter((account) => kinds.includes(account.kind) && !account.closed)
    .map(({ id, name, custodian_name }) => ({
      value: id,
      label: custodian_name === null ? name : `${name}, ${custodian_name}`,
    }));
}

/** The only place of a kind, where there is but one: chosen from the start. */
export function onlyPlace(accounts: readonly AccountRow[], kind: AccountKind): string {
  const places = accounts.filter((account) => account.kind === kind && !account.closed);
  return places.length === 1 ? (places[0]?.id ?? '') : '';
}
