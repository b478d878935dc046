import pino, { type DestinationStream, type Logger } from 'pino';

/**
 * An error as the log may hold it. A failed query also carries its parameters, which may be anything
 * somebody sent, so only what PostgreSQL and the stack say of it is kept.
 */
function plainError(error: unknown): unknown {
  if (!(error instanceof Error)) return String(error);
  const { code, constraint } = error as { code?: unknown; constraint?: unknown };
  return { name: error.name, message: error.message, stack: error.stack, code, constraint };
}

/** JSON lines on standard output. Bodies are never logged; what could still carry a secret is cut out. */
export function createLogger(level: string, destination?: DestinationStream): Logger {
  const options = {
    level,
    base: undefined,
    serializers: { err: plainError },
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: {
      paths: ['authorization', 'cookie', 'password', 'token', '*.authorization', '*.cookie', '*.password', '*.token'],
      censor: '[cut]',
    },
  };
  return destination ? pino(options, destination) : pino(options);
}

export type { Logger } from 'pino';
