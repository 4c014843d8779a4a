/** What the body parser and the upload parser refuse, in our words. */
import multer from 'multer';
import { z } from '../../shared/schemas/zod.ts';
import { ProblemError } from '../problem.ts';

const parserFault = z.object({ type: z.string(), status: z.number() });

/** The problem for an error of a parser, or null for any other error. */
export function parserProblem(error: unknown): ProblemError | null {
  if (error instanceof multer.MulterError) {
    return error.code === 'LIMIT_FILE_SIZE'
      ? new ProblemError('too_large', 'A file has at most 10 MB. Make it smaller, or hand it in in parts.')
      : new ProblemError('malformed', 'The upload can’t be read. Choose the file again.');
  }
  if (error instanceof URIError) return new ProblemError('malformed', 'The address can’t be read.');
  const read = parserFault.safeParse(error);
  if (!read.success) return null;
  switch (read.data.type) {
    case 'entity.too.large':
      return new ProblemError('too_large', 'That is more than one megabyte at once. Do it in parts.');
    case 'encoding.unsupported':
    case 'charset.unsupported':
      return new ProblemError('wrong_content_type', 'The request has to be JSON in UTF-8.');
    default:
      return read.data.status < 500
        ? new ProblemError('malformed', 'The request can’t be read as JSON.')
        : null;
  }
}
