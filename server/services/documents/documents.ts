/** Keeps files under ids of our own, outside what is served, and gives them back as attachments. */
import { createHash, randomUUID } from 'node:crypto';
import type { DocumentJson } from '../../../shared/schemas/documents.ts';
import { MOST_BYTES_OF_WORKSHOP, documentJson } from '../../../shared/schemas/documents.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import { ProblemError } from '../../problem.ts';
import type { PersonInWorkshop } from '../events/person.ts';
import { mediaTypeOf } from './media-type.ts';

export interface FileIn {
  readonly name: string;
  readonly bytes: Uint8Array;
}

/**
 * Keeps a file that somebody handed in. Refuses what is none of the allowed types by its content, and what passes the
 * workshop's quota. The file is stored before its row, so that no row ever names a file that is not there.
 */
export async function keepDocument(
  context: AppContext,
  file: FileIn,
  by: PersonInWorkshop,
): Promise<DocumentJson> {
  const media_type = mediaTypeOf(file.bytes, file.name);
  if (media_type === null) {
    throw new ProblemError(
      'wrong_content_type',
      'That is no PDF, picture or CSV file by its content. Choose another file.',
    );
  }
  return storeDocument(context, { ...file, media_type }, by);
}

/** Keeps a file that the program made itself. */
export async function storeDocument(
  context: AppContext,
  file: FileIn & { readonly media_type: string },
  by: PersonInWorkshop,
): Promise<DocumentJson> {
  const id = randomUUID();
  const scope = { workshop_id: by.workshop_id, user_id: null };
  const { kept } = await context.db.inScope(scope, (tx) =>
    tx.one(
      z.object({ kept: z.string() }),
      'SELECT coalesce(sum(bytes), 0)::text AS kept FROM document WHERE workshop_id = current_workshop()',
    ),
  );
  if (BigInt(kept) + BigInt(file.bytes.length) > BigInt(MOST_BYTES_OF_WORKSHOP)) {
    throw new ProblemError(
      'too_large',
      'The workshop keeps as many files as it may. Ask whoever runs Grainward for more room.',
    );
  }
  const sha256 = createHash('sha256').update(file.bytes).digest('hex');
  await context.files.put(`${by.workshop_id}/${id}`, file.bytes);
  return context.db.inScope(scope, (tx) =>
    tx.one(documentJson, INSERT, [
      id,
      fileName(file.name),
      file.media_type,
      file.bytes.length,
      sha256,
      by.person_id,
    ]),
  );
}

/** A file's row and bytes. Throws `not_found`. */
export async function readDocument(
  context: AppContext,
  id: string,
  by: PersonInWorkshop,
): Promise<DocumentJson & { bytes_of: Uint8Array }> {
  const scope = { workshop_id: by.workshop_id, user_id: null };
  const row = await context.db.inScope(scope, (tx) =>
    tx.maybe(
      documentJson,
      'SELECT id::text, name, media_type, bytes::text, sha256 FROM document WHERE workshop_id = current_workshop() AND id = $1::uuid',
      [id],
    ),
  );
  const bytes = row === null ? null : await context.files.get(`${by.workshop_id}/${id}`);
  if (row === null || bytes === null)
    throw new ProblemError('not_found', 'There is no such file. Look at the voucher again.');
  return { ...row, bytes_of: bytes };
}

/** A name without anything that could be a path, at most 120 characters. */
function fileName(name: string): string {
  const plain = name
    .normalize('NFC')
    .replace(/[\p{Cc}\p{Cf}/\\:*?"<>|]/gu, '_')
    .trim();
  return plain.slice(-120) || 'file';
}

const INSERT = `INSERT INTO document (workshop_id, id, name, media_type, bytes, sha256, added_by)
  VALUES (current_workshop(), $1::uuid, $2, $3, $4, $5, $6::uuid) RETURNING id::text, name, media_type, bytes::text, sha256`;
