import pino from 'pino';

/** One line of JSON an event; secrets never reach it. */
export const log = pino({
  level: process.env.LOG_LEVEL ?? 'info',
  redact: ['password', '*.password', 'token', '*.token', 'headers.cookie', 'headers.authorization'],
});
