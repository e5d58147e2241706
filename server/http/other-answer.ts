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
