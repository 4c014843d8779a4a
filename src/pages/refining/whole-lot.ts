/** Where the amount of a consigned lot begins: mixed dust goes whole, and most else does. */
import type { TypedAmount } from '../../components/domain/amount.tsx';
import { noAmount } from '../../components/domain/amount.tsx';

export const wholeLot: TypedAmount = { ...noAmount, how: 'all' };
