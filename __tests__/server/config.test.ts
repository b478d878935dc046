import { ConfigFault, readConfig } from '../../server/config';

const GOOD = { DATABASE_URL: 'postgres://u:p@127.0.0.1:5432/d', LOLLOP_TOKEN_SECRET: 'x'.repeat(32) };

test('what is left out has its usual value, and nothing can be changed later', () => {
  const config = readConfig(GOOD);
  expect(config).toMatchObject({ HOST: '127.0.0.1', PORT: 4050, LOLLOP_ACCESS_MINUTES: 15, LOLLOP_PASSWORD_COST: 12 });
  expect(Object.isFrozen(config)).toBe(true);
});

test('every fault is on its own line, and no value is repeated', () => {
  const read = () =>
    readConfig({
      DATABASE_URL: 'mysql://secret',
      LOLLOP_TOKEN_SECRET: 'short',
      PORT: 'seven',
      LOLLOP_LOG_LEVEL: 'loud',
    });
  expect(read).toThrow(ConfigFault);
  const message = String(
    (() => {
      try {
        read();
      } catch (error) {
        return (error as Error).message;
      }
    })(),
  );
  expect(message.split('\n').map((line) => line.trim().split(' ')[0])).toEqual([
    'Lollop',
    'DATABASE_URL',
    'LOLLOP_TOKEN_SECRET',
    'PORT',
    'LOLLOP_LOG_LEVEL',
  ]);
  expect(message).not.toMatch(/mysql|short|seven|loud/);
});

test('an empty environment says what is missing', () => {
  expect(() => readConfig({})).toThrow(/DATABASE_URL is missing[^]*LOLLOP_TOKEN_SECRET is missing/);
});
