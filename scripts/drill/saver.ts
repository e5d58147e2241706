import { setTimeout as sleep } from 'node:timers/promises';
import { z } from 'zod';
import { caseSchema, versionDetailSchema } from '#shared/contracts/cases.ts';
import type { CaseDocument, VersionDetail } from '#shared/contracts/cases.ts';
import { listSchema } from '#shared/contracts/list.ts';
import { tokenOf } from './token.ts';

const PATIENCE = 120_000;

/** A save the server answered with 201. */
export interface Acknowledged {
  caseId: string;
  number: number;
  n: number;
  hash: string;
  etag: string;
  /** What makes its document unlike every other. */
  energy: number;
}

function documentAt(energy: number): CaseDocument {
  return {
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 0 },
    energy: { value: energy, unit: 'eV' },
    interaction: {
      terms: [
        { form: 'yukawa', V0: { value: -10, unit: 'eV' }, a: { value: 1, unit: 'angstrom' } },
      ],
    },
    methods: ['born1'],
    angles: { unit: 'deg', values: [0, 60, 180] },
  };
}

/** A client that saves as a careful script does: a key for each save, sent again until it is answered. */
export class Saver {
  retries = 0;
  longestWait = 0;

  private constructor(
    private readonly url: string,
    private readonly secret: string,
  ) {}

  static async signIn(url: string): Promise<Saver> {
    const secret = await tokenOf(url, 'experimentalist');
    return new Saver(url, secret);
  }

  private request(path: string, init: RequestInit = {}): Promise<Response> {
    const authorization = `Bearer ${this.secret}`;
    return fetch(`${this.url}${path}`, {
      ...init,
      headers: { ...init.headers, authorization, 'content-type': 'application/json' },
      signal: AbortSignal.timeout(20_000),
    });
  }

  private async answered(path: string, init: RequestInit): Promise<Response> {
    const begun = Date.now();
    for (;;) {
      const answer = await this.request(path, init).catch(() => undefined);
      this.longestWait = Math.max(this.longestWait, Date.now() - begun);
      if (answer && answer.status < 500) return answer;
      if (Date.now() - begun > PATIENCE) throw new Error(`No answer for ${PATIENCE / 1000} s.`);
      this.retries += 1;
      await sleep(100);
    }
  }

  /** Saves a new case, or a version on top of `previous`; returns only with the acknowledgement. */
  async save(energy: number, previous?: Acknowledged): Promise<Acknowledged> {
    const path = previous ? `/api/cases/${previous.caseId}/versions` : '/api/cases';
    const title = previous ? {} : { title: `Drill, first at ${energy} eV` };
    const answer = await this.answered(path, {
      method: 'POST',
      headers: {
        'idempotency-key': crypto.randomUUID(),
        ...(previous && { 'if-match': previous.etag }),
      },
      body: JSON.stringify({ ...title, document: documentAt(energy) }),
    });
    if (answer.status !== 201) throw new Error(`${answer.status}: ${await answer.text()}`);
    const etag = answer.headers.get('etag') ?? '';
    const { id, number, version } = caseSchema.parse(await answer.json());
    return { caseId: id, number, n: version.n, hash: version.hash, etag, energy };
  }

  async readVersion(caseId: string, n: number): Promise<VersionDetail | undefined> {
    const answer = await this.request(`/api/cases/${caseId}/versions/${n}`);
    return answer.status === 200 ? versionDetailSchema.parse(await answer.json()) : undefined;
  }

  async countVersions(caseId: string): Promise<number> {
    const answer = await this.request(`/api/cases/${caseId}/versions`);
    return listSchema(z.unknown()).parse(await answer.json()).total;
  }

  async numbers(): Promise<number[]> {
    const answer = await this.request('/api/cases?owner=me&q=Drill&pageSize=200&sort=number');
    const list = listSchema(caseSchema.pick({ number: true }));
    return list.parse(await answer.json()).items.map(({ number }) => number);
  }
}
