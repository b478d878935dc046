import { z } from 'zod';
import { ApiClient } from '../../components/api/client';
import { ApiProblem, fieldFaults, NO_CONNECTION } from '../../components/api/problem';

const ME = {
  id: '7b0e6b9e-5b0e-4c7e-9a39-0d5c1f5d1a11',
  name: 'Joss',
  email: 'joss@gannet.example',
  administrator: false,
  memberships: [],
};
const session = (accessToken: string) => ({ accessToken, expiresAt: '2026-12-01T10:00:00.000Z', me: ME });
const answer = (status: number, body: unknown) =>
  ({ ok: status < 300, status, json: () => Promise.resolve(body), headers: new Map() }) as unknown as Response;

it('renews once for all waiting calls when the token has run out, and repeats them', async () => {
  const calls: string[] = [];
  let token = 'old';
  global.fetch = jest.fn((path: string, init: RequestInit) => {
    calls.push(`${init.method} ${path}`);
    if (path === '/api/session') return Promise.resolve(answer(201, session('old')));
    if (path === '/api/session/refresh') {
      token = 'new';
      return Promise.resolve(answer(200, session('new')));
    }
    const given = (init.headers as Record<string, string>).Authorization;
    return Promise.resolve(
      given === 'Bearer new' && token === 'new'
        ? answer(200, 7)
        : answer(401, { type: 'about:blank', title: 'x', status: 401 }),
    );
  }) as unknown as typeof fetch;
  const api = new ApiClient();
  await api.signIn('joss@gannet.example', 'secret');
  await expect(Promise.all([api.get('/api/a', z.number()), api.get('/api/b', z.number())])).resolves.toEqual([7, 7]);
  expect(calls.filter((call) => call.endsWith('refresh'))).toHaveLength(1);
});

it('turns a problem of the server into its sentence and its fields', async () => {
  const problem = {
    type: '/problems/invalid-request',
    title: 'Invalid',
    status: 400,
    detail: 'Something is missing.',
    errors: [{ pointer: '/email', detail: 'Give an e-mail address.' }],
  };
  global.fetch = jest.fn(() => Promise.resolve(answer(400, problem))) as unknown as typeof fetch;
  const error = await new ApiClient().signIn('x', 'y').catch((e: unknown) => e);
  expect(error).toBeInstanceOf(ApiProblem);
  expect((error as Error).message).toBe('Something is missing.');
  expect(fieldFaults(error, ['email', 'password'])).toEqual({
    byField: { email: 'Give an e-mail address.' },
    rest: null,
  });
});

it('says that there is no connection', async () => {
  global.fetch = jest.fn(() => Promise.reject(new TypeError('network'))) as unknown as typeof fetch;
  const error = (await new ApiClient().signIn('x', 'y').catch((e: unknown) => e)) as ApiProblem;
  expect(error.type).toBe(NO_CONNECTION);
});
