import { QueryFailedError } from 'typeorm';

/** True when PostgreSQL refused a row because of this unique constraint (SQLSTATE 23505). */
export function breaksUnique(error: unknown, constraint: string): boolean {
  if (!(error instanceof QueryFailedError)) return false;
  const cause = error.driverError as { code?: string; constraint?: string };
  return cause.code === '23505' && cause.constraint === constraint;
}
