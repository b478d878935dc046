import { z } from 'zod';
import { ApiClient } from '../../components/api/client';
import { ApiProblem, NO_CONNECTION } from '../../components/api/problem';

type Ending = { status: number; body: string } | 'lost';

/** A request that reports half of the bytes sent and then ends as told, in the order given. */
function answerUploads(endings: Ending[]) {
  const opened: string[] = [];
  class Request {
    upload: { onprogress?: (event: object) => void } = {};
    status = 0;
    responseText = '';
    onload = () => undefined;
    onerror = () => undefined;
    onabort = () => undefined;
    open = (method: string, path: string) => void opened.push(`${method} ${path}`);
    setRequestHeader = () => undefined;
    abort = () => this.onabort();
    send() {
      this.upload.onprogress?.({ lengthComputable: true, loaded: 5, total: 10 });
      const ending = endings.shift();
      if (ending === undefined) return;
      if (ending === 'lost') return this.onerror();
      this.status = ending.status;
      this.responseText = ending.body;
      this.onload();
    }
  }
  global.XMLHttpRequest = Request as unknown as typeof XMLHttpRequest;
  return opened;
}

const file = new File(['patches'], 'gull.step');
const send = (seen: number[] = [], signal?: AbortSignal) =>
  new ApiClient().upload('/api/models', file, z.object({ id: z.string() }), (share) => seen.push(share), signal);

it('tells how far the file is and gives what the server made of it', async () => {
  answerUploads([{ status: 201, body: '{"id":"m1"}' }]);
  const seen: number[] = [];
  await expect(send(seen)).resolves.toEqual({ id: 'm1' });
  expect(seen).toEqual([0.5]);
});

it('says which file was not kept when the connection is lost', async () => {
  answerUploads(['lost']);
  const error = (await send().catch((e: unknown) => e)) as ApiProblem;
  expect(error.type).toBe(NO_CONNECTION);
  expect(error.message).toContain('“gull.step” was not kept.');
});

it('repeats the server’s own sentence about a file it refuses', async () => {
  const detail = 'This file ends in the middle of patch 14.';
  answerUploads([{ status: 422, body: JSON.stringify({ type: '/problems/x', title: 'x', status: 422, detail }) }]);
  await expect(send()).rejects.toThrow(detail);
});

it('survives an answer that is no JSON', async () => {
  answerUploads([{ status: 502, body: '<html>' }]);
  await expect(send()).rejects.toThrow('The server gave no answer that can be read. Try again.');
});

it('renews the session once and sends the file again', async () => {
  const me = { id: '7b0e6b9e-5b0e-4c7e-9a39-0d5c1f5d1a11', name: 'Joss', email: 'joss@gannet.example' };
  const session = {
    accessToken: 'new',
    expiresAt: '2026-12-01T10:00:00.000Z',
    me: { ...me, administrator: false, memberships: [] },
  };
  global.fetch = jest.fn(() =>
    Promise.resolve({ ok: true, status: 200, json: () => Promise.resolve(session) }),
  ) as unknown as typeof fetch;
  const opened = answerUploads([
    { status: 401, body: '{}' },
    { status: 201, body: '{"id":"m2"}' },
  ]);
  await expect(send()).resolves.toEqual({ id: 'm2' });
  expect(opened).toEqual(['POST /api/models', 'POST /api/models']);
  expect(global.fetch).toHaveBeenCalledTimes(1);
});

it('stops when asked to', async () => {
  answerUploads([]);
  const stop = new AbortController();
  const sending = send([], stop.signal);
  stop.abort();
  await expect(sending).rejects.toThrow('Stopped');
});
