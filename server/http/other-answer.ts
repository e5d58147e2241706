import type { Response } from 'express';

/** An answer that is no JSON document: a text of another type, or a stream. */
export class OtherAnswer {
  constructor(readonly send: (res: Response) => Promise<void> | void) {}
}

export function textAnswer(type: string, text: string, fileName?: string): OtherAnswer {
  return new OtherAnswer((res) => {
    res.setHeader('Content-Type', `${type}; charset=utf-8`);
    if (fileName !== undefined) {
      res.setHeader('Content-Disposition', `attachment; filename="${fileName}"`);
    }
    res.status(200).send(text);
  });
}

/** Whether a client that takes JSON by default asks for this type before it. */
export function prefers(accept: string | string[] | undefined, type: string): boolean {
  const weights = new Map<string, number>();
  for (const item of [accept ?? ''].flat().join(',').toLowerCase().split(',')) {
    const [name = '', ...rest] = item.split(';').map((piece) => piece.trim());
    const q = rest.find((piece) => piece.startsWith('q='))?.slice(2);
    if (name !== '') weights.set(name, q === undefined ? 1 : Number(q) || 0);
  }
  const weightOf = (name: string) =>
    weights.get(name) ?? weights.get(name.replace(/\/.*/, '/*')) ?? weights.get('*/*') ?? 0;
  return weights.has(type) && weightOf(type) > 0 && weightOf(type) >= weightOf('application/json');
}
