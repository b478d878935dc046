import { readModel } from './read-model';
import type { ReadRequest } from './read-result';

/** The child process: reads one file, answers, and is ended by the parent. */
process.once('message', (request) => {
  process.send?.(readModel(request as ReadRequest));
});
