import { problemSchema, type Problem } from '../../shared/wire/problem';

/** A refusal of the server, or a lost connection; `detail` is written for the person at the screen. */
export class ApiProblem extends Error {
  override readonly name = 'ApiProblem';

  constructor(readonly problem: Problem) {
    super(problem.detail ?? problem.title);
  }

  get type(): string {
    return this.problem.type;
  }

  get status(): number {
    return this.problem.status;
  }
}

export const NO_CONNECTION = '/problems/no-connection';

export const lostConnection = (what = 'Nothing was lost; try again when it returns.') =>
  new ApiProblem({
    type: NO_CONNECTION,
    title: 'No connection',
    status: 0,
    detail: `No connection to the studio's server. ${what}`,
  });

/** The problem in a response that is not ok. */
export async function problemOf(response: Response): Promise<ApiProblem> {
  const body = await response.json().catch(() => null);
  return problemFrom(response.status, body);
}

export function problemFrom(status: number, body: unknown): ApiProblem {
  const parsed = problemSchema.safeParse(body);
  if (parsed.success) return new ApiProblem(parsed.data);
  return new ApiProblem({
    type: 'about:blank',
    title: 'The server gave no answer',
    status,
    detail: 'The server gave no answer that can be read. Try again.',
  });
}

/** Faults by form field (the last part of each pointer), and what belongs to none. */
export function fieldFaults(
  error: unknown,
  fields: readonly string[],
): { byField: Record<string, string>; rest: string | null } {
  if (!(error instanceof ApiProblem))
    return { byField: {}, rest: error ? String(error instanceof Error ? error.message : error) : null };
  const byField: Record<string, string> = {};
  for (const { pointer, detail } of error.problem.errors ?? []) {
    const field = pointer.split('/').pop() ?? '';
    if (fields.includes(field)) byField[field] ??= detail;
  }
  return { byField, rest: Object.keys(byField).length > 0 ? null : error.message };
}
