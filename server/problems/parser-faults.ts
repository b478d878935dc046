import { MulterError } from 'multer';
import { InvalidRequest, TooLarge } from './domain-errors';

const hasStatus = (x: unknown): x is { status: number; type?: string } =>
  typeof x === 'object' && x !== null && 'status' in x && typeof x.status === 'number';

/** Faults of the libraries that read requests, in our words; anything else comes back as it is. */
export function fromParserFault(thrown: unknown): unknown {
  if (thrown instanceof MulterError) {
    if (thrown.code === 'LIMIT_FILE_SIZE') return new TooLarge('The file is larger than 64 MB. Nothing was kept.');
    return new InvalidRequest('Send one file in the field "file", and if wanted a name in the field "name".');
  }
  if (thrown instanceof URIError) return new InvalidRequest('The address holds a character code that means nothing.');
  if (!hasStatus(thrown)) return thrown;
  if (thrown.status === 413) return new TooLarge('The request is larger than is accepted here. Nothing was kept.');
  if (thrown.type === 'entity.parse.failed') return new InvalidRequest('The body is not JSON.');
  if (thrown.status >= 400 && thrown.status < 500) return new InvalidRequest('The body of the request cannot be read.');
  return thrown;
}
