import { createServer, type Server } from 'node:http';
import { buildApp } from './app';
import { ConfigFault, readConfig } from './config';
import { createDataSource } from './data-source';
import { prepareDatabase } from './database';
import { createLogger, type Logger } from './logger';
import { buildServices } from './services';

/** Requests under way get this long; then their connections are cut. */
const DRAIN_MILLISECONDS = 5_000;
const GIVE_UP_MILLISECONDS = 10_000;

async function listen(server: Server, port: number, host: string): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, host, resolve);
  });
}

async function close(server: Server): Promise<void> {
  const cut = setTimeout(() => server.closeAllConnections(), DRAIN_MILLISECONDS);
  await new Promise<void>((resolve) => server.close(() => resolve()));
  clearTimeout(cut);
}

/** What to say when starting fails, for the faults a person can mend; the others keep their trace. */
function sentence(error: unknown): string {
  if (error instanceof ConfigFault) return error.message;
  const code = (error as { code?: string }).code;
  if (code === 'EADDRINUSE') return 'This port is taken. Stop the other program, or give another one in PORT.';
  if (code === 'EACCES') return 'This port may not be used by this user. Give another one in PORT.';
  if (code === 'ECONNREFUSED') return 'No database answers at DATABASE_URL. Start PostgreSQL, or mend the address.';
  if (code === '28P01') return 'The database refuses the password in DATABASE_URL.';
  if (code === '3D000') return 'The database named in DATABASE_URL does not exist.';
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}

async function main(): Promise<void> {
  const config = readConfig(process.env);
  const logger: Logger = createLogger(config.LOLLOP_LOG_LEVEL);
  const data = await createDataSource(config.DATABASE_URL).initialize();
  const services = buildServices(config, data);
  await prepareDatabase(data, services.materials);
  const server = createServer(buildApp(config, services, logger));
  await listen(server, config.PORT, config.HOST);
  logger.info({ address: server.address() }, 'listening');

  const stop = async (signal: string) => {
    logger.info({ signal }, 'stopping');
    services.health.stop();
    setTimeout(() => process.exit(1), GIVE_UP_MILLISECONDS).unref();
    await close(server);
    await data.destroy();
    process.exit(0);
  };
  process.once('SIGTERM', stop);
  process.once('SIGINT', stop);
}

main().catch((error: unknown) => {
  process.stderr.write(`${sentence(error)}\n`);
  process.exit(1);
});
