/** The files of a dossier (grainward-dossier, version 1) and what each holds. */

export const CONTENTS = [
  { path: 'statement.pdf', content: 'Holdings, values, limits, counts, losses, who signed what' },
  { path: 'book.jsonl', content: 'The chain, a record a line: the exact bytes that were hashed' },
  { path: 'data/accounts.csv', content: 'Places, accounts and who answers for them' },
  { path: 'data/lots.csv', content: 'Lots with form, alloy, owner, origin and fineness' },
  { path: 'data/vouchers.csv', content: 'Every record, with its hash' },
  { path: 'data/entries.csv', content: 'Every entry, five masses each' },
  { path: 'data/holdings.csv', content: 'What lies where at the end, with its value' },
  { path: 'data/weighings.csv', content: 'Gross, tare, balance, by whom' },
  { path: 'data/counts.csv, tests.csv, handovers.csv', content: 'What the statement rests on' },
  {
    path: 'data/prices.csv, people.csv, documents.csv',
    content: 'Prices with source, people, digests of papers',
  },
  {
    path: 'manifest.json, manifest.sig',
    content: 'Lengths, digests, earlier chain heads, Ed25519 signature',
  },
  { path: 'public-key.pem, VERIFY.md', content: 'The key, and how to check all this by hand' },
] as const;
