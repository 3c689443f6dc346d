import pino from 'pino';

export const log = pino({
  level: process.env.LOG_LEVEL ?? (process.env.NODE_ENV === 'test' ? 'silent' : 'info'),
  // There PostgreSQL repeats the row that it refused, a password's hash and all.
  redact: ['err.detail', 'err.where'],
});
