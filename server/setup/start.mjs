import net from 'node:net';
import { buildServer, buildWeb } from './build.mjs';
import { demoLines } from './demo-people.mjs';
import { checkNode, ensurePackages } from './packages.mjs';
import { dataFolder, ensureDatabase, startPostgres } from './postgres.mjs';
import { runShown, startShown } from './processes.mjs';
import { runSetup, say, SetupFault } from './say.mjs';
import { tokenSecret } from './secrets.mjs';

const port = Number(process.env.PORT ?? 4050);
const host = process.env.HOST ?? '127.0.0.1';

function checkPort() {
  return new Promise((resolve, reject) => {
    const probe = net.createServer();
    probe.once('error', (error) => {
      const why = error.code === 'EACCES' ? 'may not be used by this user' : 'is taken';
      reject(
        new SetupFault(`Port ${port} ${why}. Stop the other program, or choose another: PORT=${port + 1} npm start`),
      );
    });
    probe.listen(port, host, () => probe.close(resolve));
  });
}

await runSetup(async () => {
  checkNode();
  if (!(port >= 1 && port <= 65535))
    throw new SetupFault(`PORT must be a number from 1 to 65535, not “${process.env.PORT}”.`);
  await checkPort();
  ensurePackages();
  const data = dataFolder();
  const postgres = await startPostgres(data);
  let child = null;
  let stopping = false;
  const stop = (code) => {
    if (stopping) return;
    stopping = true;
    say('\nStopping …');
    const finish = () => {
      postgres.stop();
      process.exit(code);
    };
    if (child && child.exitCode === null) {
      child.once('exit', finish);
      child.kill('SIGTERM');
    } else finish();
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.once(signal, () => stop(0));
  try {
    const url = await ensureDatabase(postgres.url, 'lollop');
    buildWeb();
    await buildServer();
    const env = {
      DATABASE_URL: url,
      LOLLOP_TOKEN_SECRET: tokenSecret(data),
      PORT: String(port),
      HOST: host,
      LOLLOP_LOG_LEVEL: process.env.LOLLOP_LOG_LEVEL ?? 'warn',
      NODE_ENV: 'production',
    };
    runShown(process.execPath, ['dist-server/seed-demo.js'], 'The demo could not be loaded; the lines above say why.', {
      env: { ...process.env, ...env },
    });
    child = startShown(process.execPath, ['dist-server/main.js'], env);
    child.once('exit', (code) => stop(code ?? 1));
    await untilReady(`http://${host}:${port}/api/health/ready`, () => stopping);
    if (!stopping)
      say(
        `\nLollop is at http://${host === '0.0.0.0' ? '127.0.0.1' : host}:${port}\n\n${demoLines()}\n\nCtrl-C stops everything.`,
      );
  } catch (error) {
    postgres.stop();
    throw error;
  }
});

async function untilReady(address, givenUp) {
  for (let tries = 0; tries < 300 && !givenUp(); tries++) {
    const ok = await fetch(address).then(
      (answer) => answer.ok,
      () => false,
    );
    if (ok) return;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}
