import type { RequestHandler } from 'express';
import multer from 'multer';
import { MAX_NAME, MAX_UPLOAD_BYTES } from '../../shared/limits';
import { plainText } from '../plain-text';

/** One file in the field `file`, in memory; counted while it streams and cut off above the limit. */
export function modelUpload(): RequestHandler[] {
  const limits = { fileSize: MAX_UPLOAD_BYTES, files: 1, fields: 2, fieldSize: 4 * MAX_NAME, parts: 4 };
  // The package's types do not know `defParamCharset` yet; without it file names are read as Latin-1.
  const options: multer.Options & { defParamCharset: string } = {
    storage: multer.memoryStorage(),
    limits,
    defParamCharset: 'utf8',
  };
  const reader = multer(options);
  const plainName: RequestHandler = (req, _res, next) => {
    const name: unknown = req.body?.name;
    if (typeof name === 'string') req.body.name = plainText(name);
    next();
  };
  return [reader.single('file') as RequestHandler, plainName];
}
