import jwt from 'jsonwebtoken';
import request from 'supertest';
import { sessionSchema } from '../../shared/wire/session';
import { type Desk, openDesk, PASSWORD } from './support/desk';

const OWN = { 'X-Lollop': '1' };
let desk: Desk;

beforeAll(async () => {
  desk = await openDesk();
});
afterAll(() => desk?.close());

const signIn = (body: object) => request(desk.app).post('/api/session').send(body);
const refresh = (cookie: string, headers: Record<string, string> = OWN) =>
  request(desk.app).post('/api/session/refresh').set(headers).set('Cookie', cookie);

/** `name=value` of the refresh cookie an answer sets. */
function cookieOf(response: request.Response): string {
  return (response.get('Set-Cookie') ?? [''])[0]!.split(';')[0]!;
}

async function freshCookie(): Promise<string> {
  return cookieOf(await signIn({ email: desk.people.artist.email, password: PASSWORD }).expect(200));
}

const ageUsedTokens = () =>
  desk.rows("UPDATE refresh_token SET used_at = used_at - interval '11 seconds' WHERE used_at IS NOT NULL");

describe('POST /api/session', () => {
  test('answers with a short token, who it is, and the refresh token in the cookie only', async () => {
    const response = await signIn({ email: 'Artist@Studio.Example', password: PASSWORD }).expect(200);
    const session = sessionSchema.parse(response.body);
    expect(session.me).toMatchObject({ name: 'artist', administrator: false });
    expect(session.me.memberships).toEqual([{ production: { id: desk.fair, name: 'The Tide Fair' }, role: 'artist' }]);
    const lifeMinutes = (Date.parse(session.expiresAt) - Date.now()) / 60_000;
    expect(lifeMinutes).toBeGreaterThan(13);
    expect(lifeMinutes).toBeLessThanOrEqual(15);

    const cookie = response.get('Set-Cookie')![0]!;
    expect(cookie).toMatch(/^lollop-refresh=[\w-]{43}; Path=\/; Expires=[^;]+; HttpOnly; SameSite=Strict$/);
    const value = cookieOf(response).split('=')[1]!;
    expect(JSON.stringify(response.body)).not.toContain(value);
    const stored = await desk.rows('SELECT * FROM refresh_token');
    expect(JSON.stringify(stored)).not.toContain(value);
  });

  test('behind a proxy that speaks https the cookie is Secure and bound to the host', async () => {
    const proxied = await openDesk({ LOLLOP_TRUST_PROXY: '1' });
    const response = await request(proxied.app)
      .post('/api/session')
      .set('X-Forwarded-Proto', 'https')
      .send({ email: proxied.people.artist.email, password: PASSWORD })
      .expect(200);
    expect(response.get('Set-Cookie')![0]).toMatch(
      /^__Host-lollop-refresh=[^;]+; Path=\/; Expires=[^;]+; HttpOnly; Secure; SameSite=Strict$/,
    );
    await request(proxied.app)
      .post('/api/session/refresh')
      .set({ ...OWN, 'X-Forwarded-Proto': 'https', Cookie: cookieOf(response) })
      .expect(200);
    await proxied.close();
  });

  test('a wrong password and an unknown address get the same answer, and the failure is on the audit list', async () => {
    const wrong = await signIn({ email: desk.people.artist.email, password: 'wrong' }).expect(401);
    const unknown = await signIn({ email: 'nobody@studio.example', password: PASSWORD }).expect(401);
    expect(wrong.body.type).toBe('/problems/wrong-credentials');
    const { instance: _a, ...first } = wrong.body;
    const { instance: _b, ...second } = unknown.body;
    expect(first).toEqual(second);
    expect(wrong.get('Set-Cookie')).toBeUndefined();
    const events = await desk.rows(
      "SELECT person_id, address FROM audit_event WHERE kind = 'sign-in-failed' ORDER BY created_at",
    );
    expect(events.map((event) => event.person_id)).toEqual([desk.people.artist.id, null]);
    expect(events[0]!.address).toMatch(/127\.0\.0\.1/);
  });

  test('an unknown address costs one password comparison too', async () => {
    const compared = jest.spyOn(jest.requireActual<typeof import('bcryptjs')>('bcryptjs'), 'compare');
    await signIn({ email: 'nobody@studio.example', password: PASSWORD }).expect(401);
    expect(compared).toHaveBeenCalledTimes(1);
    expect(compared).toHaveBeenCalledWith(PASSWORD, expect.stringMatching(/^\$2[aby]\$04\$.{53}$/));
    compared.mockRestore();
  });

  test('faults point at their fields', async () => {
    const response = await signIn({ email: 'no address', password: '' }).expect(400);
    expect(response.type).toBe('application/problem+json');
    expect(response.body.errors).toEqual([
      { pointer: '/email', detail: 'Give an e-mail address.' },
      { pointer: '/password', detail: 'Give your password.' },
    ]);
    await signIn({}).expect(400);
  });

  test('a body that is not JSON is a problem, not a failure', async () => {
    const response = await request(desk.app).post('/api/session').type('json').send('{"email":').expect(400);
    expect(response.body).toMatchObject({ type: '/problems/invalid-request', detail: 'The body is not JSON.' });
  });

  test('text that PostgreSQL cannot keep does no harm', async () => {
    await signIn({ email: 'artist@studio.example', password: 'a\u0000b\ud800' }).expect(401);
  });
});

describe('access tokens', () => {
  const productions = (token: string) =>
    request(desk.app).get('/api/productions').set('Authorization', `Bearer ${token}`);

  test('one signed by somebody else, an expired one, an unsigned one and nonsense are refused', async () => {
    const claims = jwt.decode(desk.people.artist.token) as jwt.JwtPayload;
    const { iat: _iat, exp: _exp, ...rest } = claims;
    const foreign = jwt.sign(rest, 'another secret that is long enough too');
    const expired = jwt.sign(rest, desk.config.LOLLOP_TOKEN_SECRET, { expiresIn: -1 });
    const unsigned = jwt.sign(rest, '', { algorithm: 'none' });
    for (const token of [foreign, expired, unsigned, 'nonsense', '']) {
      const response = await productions(token).expect(401);
      expect(response.body.type).toBe('/problems/not-signed-in');
      expect(response.get('WWW-Authenticate')).toMatch(/^Bearer/);
    }
  });

  test('one of a session that has ended is refused at once', async () => {
    const response = await signIn({ email: desk.people.artist.email, password: PASSWORD });
    await productions(response.body.accessToken).expect(200);
    await request(desk.app).delete('/api/session').set(OWN).set('Cookie', cookieOf(response)).expect(204);
    const refused = await productions(response.body.accessToken).expect(401);
    expect(refused.body.type).toBe('/problems/session-ended');
  });
});

describe('POST /api/session/refresh', () => {
  test('exchanges the token for another one', async () => {
    const first = await freshCookie();
    const answer = await refresh(first).expect(200);
    sessionSchema.parse(answer.body);
    const second = cookieOf(answer);
    expect(second).not.toBe(first);
    await refresh(second).expect(200);
  });

  test('needs the header that only the own client sends', async () => {
    const cookie = await freshCookie();
    const response = await refresh(cookie, {}).expect(403);
    expect(response.body.type).toBe('/problems/not-allowed');
    await refresh(cookie).expect(200);
  });

  test('without a cookie nobody is signed in; with an unknown one the session has ended', async () => {
    const none = await request(desk.app).post('/api/session/refresh').set(OWN).expect(401);
    expect(none.body.type).toBe('/problems/not-signed-in');
    const unknown = await refresh(`lollop-refresh=${'x'.repeat(43)}`).expect(401);
    expect(unknown.body.type).toBe('/problems/session-ended');
  });

  test('two tabs that send one token at the same moment both stay signed in, with one successor', async () => {
    const cookie = await freshCookie();
    await desk.openConnections();
    const answers = await Promise.all([refresh(cookie), refresh(cookie), refresh(cookie)]);
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200]);
    expect(new Set(answers.map(cookieOf)).size).toBe(1);
    await refresh(cookieOf(answers[0]!)).expect(200);
  });

  test('a used token after the grace ends the whole session', async () => {
    const first = await freshCookie();
    const second = cookieOf(await refresh(first).expect(200));
    await ageUsedTokens();
    const replay = await refresh(first).expect(401);
    expect(replay.body.type).toBe('/problems/session-ended');
    await refresh(second).expect(401);
    const events = await desk.rows("SELECT person_id FROM audit_event WHERE kind = 'session-revoked'");
    expect(events).toHaveLength(1);
  });

  test('a used token whose successor was used ends the session even within the grace', async () => {
    const first = await freshCookie();
    const second = cookieOf(await refresh(first).expect(200));
    const third = cookieOf(await refresh(second).expect(200));
    await refresh(first).expect(401);
    await refresh(third).expect(401);
  });

  test('other sessions of the same person go on', async () => {
    const stolen = await freshCookie();
    const other = await freshCookie();
    await refresh(stolen).expect(200);
    await ageUsedTokens();
    await refresh(stolen).expect(401);
    await refresh(other).expect(200);
  });

  test('a session ends on its day, however often it was renewed, and the next sign-in clears it away', async () => {
    const next = cookieOf(await refresh(await freshCookie()).expect(200));
    await desk.rows(
      "UPDATE refresh_session SET created_at = now() - interval '15 days', expires_at = now() - interval '1 second'",
    );
    await refresh(next).expect(401);
    const ended = 'SELECT 1 FROM refresh_session WHERE person_id = $1 AND expires_at < now()';
    expect(await desk.rows(ended, [desk.people.artist.id])).not.toEqual([]);
    const { email } = desk.people.artist;
    desk.people.artist.token = (await desk.services.sessions.signIn(email, PASSWORD, undefined)).accessToken;
    expect(await desk.rows(ended, [desk.people.artist.id])).toEqual([]);
  });
});

describe('DELETE /api/session', () => {
  test('ends the session and takes the cookie away', async () => {
    const cookie = await freshCookie();
    const response = await request(desk.app).delete('/api/session').set(OWN).set('Cookie', cookie).expect(204);
    expect(response.get('Set-Cookie')![0]).toMatch(/^lollop-refresh=; Path=\/; Expires=Thu, 01 Jan 1970/);
    await refresh(cookie).expect(401);
    const events = await desk.rows(
      "SELECT person_id FROM audit_event WHERE kind = 'signed-out' ORDER BY created_at DESC LIMIT 1",
    );
    expect(events).toEqual([{ person_id: desk.people.artist.id }]);
  });

  test('needs the header, and is content with nobody to sign out', async () => {
    const cookie = await freshCookie();
    await request(desk.app).delete('/api/session').set('Cookie', cookie).expect(403);
    await refresh(cookie).expect(200);
    await request(desk.app).delete('/api/session').set(OWN).expect(204);
  });
});
