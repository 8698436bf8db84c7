import { type DestinationStream, type Logger, pino } from 'pino';

/** Never written, wherever they turn up in what is logged. */
const SECRETS = ['password', 'secret', 'token', 'cookie', 'authorization'];

const redacted = SECRETS.flatMap((name) => [name, `*.${name}`, `*.*.${name}`]);

/** Structured log, one JSON object a line, times in ISO 8601 UTC. `program` tells the server from the worker. */
export function createLogger(program: string, level: string, destination?: DestinationStream): Logger {
  const options = {
    level,
    base: { program },
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: { paths: redacted, censor: '[left out]' },
  };
  return destination === undefined ? pino(options) : pino(options, destination);
}
