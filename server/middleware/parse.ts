import type { Request } from 'express';
import { z } from 'zod';
import { type Fault, InvalidRequest, NotFound } from '../problems/domain-errors';

const escape = (key: PropertyKey) => String(key).replaceAll('~', '~0').replaceAll('/', '~1');

export function faultsOf(error: z.ZodError, prefix = ''): Fault[] {
  return error.issues.map((issue) => ({
    pointer: `${prefix}${issue.path.map((key) => `/${escape(key)}`).join('')}`,
    detail: issue.message,
  }));
}

/** @throws InvalidRequest naming each field at fault */
export function parseBody<T extends z.ZodType>(schema: T, req: Request): z.output<T> {
  const parsed = schema.safeParse(req.body ?? {});
  if (parsed.success) return parsed.data;
  throw new InvalidRequest(
    'Some of what was sent does not fit. Mend what is marked and send it again.',
    faultsOf(parsed.error),
  );
}

export function parseQuery<T extends z.ZodType>(schema: T, req: Request): z.output<T> {
  const parsed = schema.safeParse(req.query);
  if (parsed.success) return parsed.data;
  throw new InvalidRequest('The address holds a value that does not fit.', faultsOf(parsed.error, '/query'));
}

/** An id from the path. One that cannot be an id names nothing, so it is not found. */
export function pathId(req: Request, parameter: string, what: string): string {
  const parsed = z.uuid().safeParse(req.params[parameter]);
  if (!parsed.success) throw new NotFound(what);
  return parsed.data;
}
