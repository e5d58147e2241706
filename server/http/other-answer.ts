import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { Response } from 'express';

/** An answer that is no JSON document: a text of another type, or a stream. */
export class OtherAnswer {
  constructor(readonly send: (res: Response) => Promise<void> | void) {}
}

/** A text sent piece by piece: between two of them everyone else has a turn, and the client sets the pace. */
export function textAnswer(type: string, pieces: Iterable<string>, fileName: string): OtherAnswer {
  return new OtherAnswer(async (res) => {
    res.setHeader('Content-Type', `${type}; charset=utf-8`);
    res.setHeader('Content-Disposition', `attachment; filename="${fileName}"`);
    try {
      await pipeline(Readable.from(pieces), res);
    } catch (fault) {
      // A client that left needs no answer.
      if (!res.destroyed) throw fault;
    }
  });
}

/** Whether a client asks for this type rather than JSON, which it gets where it names neither; of equals the one named first. */
export function prefers(accept: string | string[] | undefined, type: string): boolean {
  const named = [accept ?? '']
    .flat()
    .join(',')
    .toLowerCase()
    .split(',')
    .map((item) => item.split(';').map((piece) => piece.trim()));
  const weightOf = (name: string): { weight: number; place: number } => {
    const place = named.findIndex(([first]) => first === name);
    const q = named[place]?.find((piece) => piece.startsWith('q='))?.slice(2);
    return { weight: place < 0 ? 0 : q === undefined ? 1 : Number(q) || 0, place };
  };
  const [wanted, json] = [weightOf(type), weightOf('application/json')];
  if (wanted.weight === 0) return false;
  return json.weight === wanted.weight ? wanted.place < json.place : wanted.weight > json.weight;
}
