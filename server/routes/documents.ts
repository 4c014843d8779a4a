/** Handing files in and taking them out: always as an attachment, never shown in the page. */
import multer from 'multer';
import { MOST_BYTES } from '../../shared/schemas/documents.ts';
import { ProblemError } from '../problem.ts';
import { keepDocument, readDocument } from '../services/documents/documents.ts';
import { pathId } from './lots-and-vouchers.ts';
import type { Call, Route, SignedIn } from './route.ts';

const upload = multer({
  storage: multer.memoryStorage(),
  limits: { fileSize: MOST_BYTES, files: 1, fields: 0, parts: 2 },
}).single('file');

/** The one file of a multipart request. Throws `malformed` where there is none. */
async function fileOf(call: Call<SignedIn>): Promise<{ name: string; bytes: Uint8Array }> {
  await new Promise<void>((resolve, reject) => {
    upload(call.request, call.response, (error: unknown) =>
      error instanceof Error ? reject(error) : resolve(),
    );
  });
  const { file } = call.request;
  if (file === undefined)
    throw new ProblemError('malformed', 'No file came with the request. Choose the file again.');
  return { name: Buffer.from(file.originalname, 'latin1').toString('utf8'), bytes: file.buffer };
}

export const documentRoutes: readonly Route[] = [
  {
    method: 'post',
    path: '/documents',
    allow: 'document.add',
    summary: 'Hands in a PDF, picture or CSV file of at most 10 MB.',
    handle: async (call) => ({
      status: 201,
      body: await keepDocument(call.context, await fileOf(call), call.who),
    }),
  },
  {
    method: 'get',
    path: '/documents/:id',
    allow: 'book.read',
    summary: 'A file, as an attachment.',
    async handle({ context, who, params, response }) {
      const file = await readDocument(context, pathId(params['id']), who);
      response.attachment(file.name);
      response.type(file.media_type).setHeader('Content-Security-Policy', "default-src 'none'; sandbox");
      response.send(Buffer.from(file.bytes_of));
      return null;
    },
  },
];
