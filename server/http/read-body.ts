import express from 'express';
import type { Request, Response } from 'express';
import { DomainError } from '#shared/errors.ts';

/** 5,000 angles and a tabulated potential fit many times over. */
export const BODY_LIMIT = '1mb';

const readBytes = express.raw({ type: () => true, limit: BODY_LIMIT });
const JSON_TYPE = /^application\/json\s*(;\s*charset\s*=\s*"?utf-8"?\s*)?$/i;

function bytesOf(req: Request, res: Response): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    readBytes(req, res, (fault?: unknown) => {
      if (fault instanceof Error) reject(fault);
      else if (fault !== undefined) reject(new Error('The body could not be read.'));
      else resolve(Buffer.isBuffer(req.body) ? req.body : Buffer.alloc(0));
    });
  });
}

function parseJson(bytes: Buffer): unknown {
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes)) as unknown;
  } catch (fault) {
    const why = fault instanceof SyntaxError ? fault.message : 'it is not UTF-8 text';
    throw new DomainError('malformed', `The body is not JSON: ${why}.`);
  }
}

/** The JSON a request carries; undefined where it carries nothing. A form or a text is refused by its content type. */
export async function readJson(req: Request, res: Response): Promise<unknown> {
  const type = req.headers['content-type'];
  if (type !== undefined && !JSON_TYPE.test(type)) {
    throw new DomainError(
      'unsupportedMediaType',
      'Send JSON: set the header Content-Type to application/json.',
    );
  }
  const bytes = await bytesOf(req, res);
  if (bytes.length === 0) return undefined;
  if (type === undefined) {
    throw new DomainError(
      'unsupportedMediaType',
      'The request has a body without a content type; set Content-Type to application/json.',
    );
  }
  return parseJson(bytes);
}
