/** Which kind of voucher a line of the reconciliation opens; none where several kinds make it. */

const KINDS: Readonly<Record<string, string>> = {
  opening_stock: 'opening',
  from_suppliers: 'weigh_in',
  from_customers: 'weigh_in',
  drawn: 'settle',
  sold: 'delivery',
  to_customers: 'delivery',
  changed_owner: 'ownership',
  swept_up: 'sweep_up',
  deductions: 'outturn',
  used_up: 'use_up',
  written_off: 'write_off',
  assay_variance: 'reassay',
  corrections: 'correction',
};

export const kindsOfLine = (line: string): string | null => KINDS[line] ?? null;
