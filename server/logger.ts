import pino, { type DestinationStream, type Logger } from 'pino';

/** JSON lines on standard output. Bodies are never logged; what could still carry a secret is cut out. */
export function createLogger(level: string, destination?: DestinationStream): Logger {
  const options = {
    level,
    base: undefined,
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: {
      paths: ['authorization', 'cookie', 'password', 'token', '*.authorization', '*.cookie', '*.password', '*.token'],
      censor: '[cut]',
    },
  };
  return destination ? pino(options, destination) : pino(options);
}

export type { Logger } from 'pino';
