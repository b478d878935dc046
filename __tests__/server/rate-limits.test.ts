import request from 'supertest';
import { type Desk, openDesk, PASSWORD } from './support/desk';

let desk: Desk;
afterEach(() => desk?.close());

const signIn = (email: string, password: string, from = '10.0.0.1') =>
  request(desk.app).post('/api/session').set('X-Forwarded-For', from).send({ email, password });

test('one account is held back after its failures, from any address, and the others are not', async () => {
  desk = await openDesk({ LOLLOP_SIGN_INS_PER_ACCOUNT: '3', LOLLOP_TRUST_PROXY: '1' });
  const { email } = desk.people.artist;
  for (const from of ['10.0.0.1', '10.0.0.2', '10.0.0.3']) await signIn(email, 'wrong', from).expect(401);
  const held = await signIn(email.toUpperCase(), PASSWORD, '10.0.0.4').expect(429);
  expect(held.type).toBe('application/problem+json');
  expect(held.body).toMatchObject({ type: '/problems/too-many-attempts', status: 429 });
  const wait = Number(held.get('Retry-After'));
  expect(wait).toBeGreaterThan(14 * 60);
  expect(wait).toBeLessThanOrEqual(15 * 60);
  await signIn(desk.people.lead.email, PASSWORD, '10.0.0.1').expect(200);
});

test('one address is held back after its failures, for any account, and the others are not', async () => {
  desk = await openDesk({ LOLLOP_SIGN_INS_PER_ADDRESS: '3', LOLLOP_TRUST_PROXY: '1' });
  for (const name of ['a', 'b', 'c']) await signIn(`${name}@studio.example`, 'wrong').expect(401);
  await signIn(desk.people.artist.email, PASSWORD).expect(429);
  await signIn(desk.people.artist.email, PASSWORD, '10.0.0.2').expect(200);
});

test('sign-ins that succeed do not count', async () => {
  desk = await openDesk({ LOLLOP_SIGN_INS_PER_ACCOUNT: '2', LOLLOP_SIGN_INS_PER_ADDRESS: '2' });
  for (let i = 0; i < 4; i += 1) await signIn(desk.people.artist.email, PASSWORD).expect(200);
});

test('an address that asks too often is held back everywhere', async () => {
  desk = await openDesk({ LOLLOP_REQUESTS_PER_MINUTE: '2' });
  await request(desk.app).get('/api/health/live').expect(200);
  await request(desk.app).get('/api/health/live').expect(200);
  const held = await request(desk.app).get('/api/health/live').expect(429);
  expect(Number(held.get('Retry-After'))).toBeGreaterThan(0);
});
