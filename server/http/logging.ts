import { randomUUID } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import type { RequestHandler } from 'express';
import { pino } from 'pino';
import type { DestinationStream, Logger } from 'pino';
import { pinoHttp } from 'pino-http';

/** Secrets by their names, wherever a record holds them one or two levels down. */
const SECRET_KEYS = [
  'authorization',
  'cookie',
  'set-cookie',
  'password',
  'newPassword',
  'currentPassword',
  'passwordHash',
  'secret',
  'token',
  'signingKey',
];
const redact = SECRET_KEYS.flatMap((key) => [`["${key}"]`, `*["${key}"]`, `*.*["${key}"]`]);

/** An exception without the values of its SQL statement, which may be hashes and addresses. */
export function describeFault(fault: unknown): unknown {
  if (!(fault instanceof Error)) return fault;
  const code = 'code' in fault && typeof fault.code === 'string' ? fault.code : undefined;
  const isSql = code !== undefined && /^[0-9A-Z]{5}$/.test(code);
  const message = isSql ? fault.message.replace(/^[\s\S]* - /, '') : fault.message;
  return {
    type: fault.name,
    message,
    ...(code !== undefined && { code }),
    stack: fault.stack?.replace(fault.message, message),
    ...(fault.cause !== undefined && { cause: describeFault(fault.cause) }),
  };
}

export function createLogger(level: string, stream?: DestinationStream): Logger {
  const options = {
    level,
    redact: { paths: redact, censor: '[hidden]' },
    serializers: { err: describeFault },
    base: null,
    timestamp: pino.stdTimeFunctions.isoTime,
  };
  return stream ? pino(options, stream) : pino(options);
}

const KNOWN_ID = /^[\w.-]{8,64}$/;

/** One line a request: method, path without its query, status, time. No header and no body is ever logged. */
export function requestLog(logger: Logger): RequestHandler {
  return pinoHttp({
    logger,
    genReqId: (req, res) => {
      const given = req.headers['x-request-id'];
      const id = typeof given === 'string' && KNOWN_ID.test(given) ? given : randomUUID();
      res.setHeader('X-Request-Id', id);
      return id;
    },
    wrapSerializers: false,
    serializers: {
      err: describeFault,
      req: (req: IncomingMessage) => ({
        id: req.id,
        method: req.method,
        path: pathOf(req),
        address: req.socket.remoteAddress,
      }),
      res: (res: { statusCode: number }) => ({ status: res.statusCode }),
    },
    customLogLevel: (_req, res) => (res.statusCode >= 500 ? 'warn' : 'info'),
    autoLogging: { ignore: (req) => pathOf(req) === '/api/health' },
  });
}

function pathOf(req: IncomingMessage): string {
  const url =
    'originalUrl' in req && typeof req.originalUrl === 'string' ? req.originalUrl : req.url;
  return (url ?? '').split('?', 1)[0] ?? '';
}

/** The logger of one request: its lines carry the request's identifier. */
export function logOf(req: IncomingMessage): Logger {
  return req.log;
}

export function requestIdOf(req: IncomingMessage): string {
  return typeof req.id === 'string' ? req.id : '';
}
