/** VERIFY.md: how a reader checks a dossier without Grainward, and what no export can show. */

export const VERIFY_GUIDE = `# How to check this dossier

You need openssl and, for the rest, a page of any programming language. Nothing here needs Grainward.

## The signature

    openssl pkeyutl -verify -pubin -inkey public-key.pem -rawin -in manifest.json -sigfile manifest.sig

Then compare the key with the fingerprint that the workshop gave you on another way:

    openssl pkey -pubin -in public-key.pem -outform DER | openssl dgst -sha256

A key that only this dossier brings proves nothing.

## The files

manifest.json lists every file with its length and SHA-256. No other file belongs to the dossier but manifest.json,
manifest.sig, public-key.pem and, where there is one, manifest.tsr (an RFC 3161 time stamp of manifest.json).

## The book

book.jsonl is the whole book, a record a line. The bytes of a line, without the line feed that ends it, are what was
hashed: SHA-256 in lower-case hex. Each record carries the hash of the one before it in previous_hash; the first carries
64 zeros. sequence counts 1, 2, 3 without a gap. The last hash is chain.hash of the manifest.

Compare the chain with the heads of earlier dossiers that you hold: the record of that sequence must have that hash.

## The balances

Add up the entries of all records by account and lot, in grams with six decimals, with exact arithmetic. That gives
data/holdings.csv. Each voucher sums to zero in gross, gold, silver, platinum and palladium. An account's kind stands in
the record account_opened. A place (safe, bench, station, bin, outworker, approval, courier, refiner) never holds less
than nothing of a lot, after any record and at the end of any business_date. A reversal is the exact mirror of the voucher
that it names in reverses, once. No record enters a period between period_closed and period_reopened.

An account is opened once and a lot described once (account_opened, lot_described), each before a voucher names it. A
record dossier_made names the sequence and hash at which an earlier dossier ended; that record must have that hash.

## Who signed

role_given and role_ended say who held which role (proprietor, keeper, goldsmith, auditor) and to which last day. Whoever
recorded or approved a record must have held one then. reversal, write_off, count, reassay, period_closed,
period_reopened and a correction (but for one with handover_id, weighed before both) carry approved_by, of somebody else
than recorded_by, unless detail.single_handed is "yes": then one person alone was there to sign.

In the CSV files a text cell that begins with a quote mark, =, +, -, @, tab or carriage return has one more ' in front.

## What no export can show

- metal that was never booked, or was booked at a wrong weight from a wrong balance;
- somebody who signed in as somebody else;
- whether the figures of a supplier, refiner or laboratory are right;
- that this is the only book that the workshop keeps. An earlier head in your own hands, and a count of the metal, do.
`;
