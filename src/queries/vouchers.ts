/** Vouchers: the register by filter, and one whole. */
import { useSuspenseQuery } from '@tanstack/react-query';
import { voucherPage, voucherWhole } from '../../shared/schemas/vouchers.ts';
import { get } from '../lib/api-client.ts';
import { keys } from './keys.ts';
import { usePages } from './lots.ts';

export const useVouchers = (query: string) => usePages('/vouchers', query, voucherPage);

export function useVoucher(id: string) {
  return useSuspenseQuery({
    queryKey: keys.one('voucher', id),
    queryFn: () => get(`/vouchers/${id}`, voucherWhole),
  }).data;
}
