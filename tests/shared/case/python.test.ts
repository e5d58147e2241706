import { execFile } from 'node:child_process';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { promisify } from 'node:util';
import { beforeAll, describe, expect, test } from 'vitest';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import { apiSnippet, closedSnippet } from '#src/features/case/aids/model/python.ts';
import type { Snippet } from '#src/features/case/aids/model/python.ts';

const run = promisify(execFile);
const PYTHON = 'python3';
let python = false;
beforeAll(async () => {
  python = await run(PYTHON, ['-c', 'import math']).then(
    () => true,
    () => false,
  );
});

const Q = (value: number, unit: string) => ({ value, unit });
const document = (change: Partial<CaseDocument>): CaseDocument => ({
  ...DEFAULT_DOCUMENT,
  goldenRule: {},
  ...change,
});
const withTerms = (...terms: CaseDocument['interaction']['terms']) =>
  document({ interaction: { terms } });

function snippetOf(from: CaseDocument, charge: number | null = null): Snippet {
  const estimate = computeEstimate(from);
  return closedSnippet(from, estimate, charge);
}

const CASES: [string, CaseDocument, number | null][] = [
  ['yukawa', DEFAULT_DOCUMENT, null],
  [
    'coulomb',
    document({
      projectile: { species: 'alpha' },
      target: { kind: 'nuclide', nuclide: 'Au-197' },
      energy: Q(5.486, 'MeV'),
      interaction: { terms: [{ form: 'coulomb' }] },
      units: { length: 'fm', area: 'barn', energy: 'MeV' },
    }),
    158,
  ],
  [
    'squareWell, complex, with its series at small angles',
    document({
      projectile: { species: 'neutron' },
      target: { kind: 'nuclide', nuclide: 'Ca-40' },
      energy: Q(14, 'MeV'),
      angles: { unit: 'deg', from: 0.5, to: 180, count: 100 },
      interaction: {
        terms: [{ form: 'squareWell', V0: Q(-40, 'MeV'), W0: Q(-5, 'MeV'), R: Q(4, 'fm') }],
      },
    }),
    null,
  ],
  ['gaussian', withTerms({ form: 'gaussian', V0: Q(3, 'eV'), a: Q(0.7, 'angstrom') }), null],
  [
    'a sum, in radians',
    document({
      angles: { unit: 'rad', from: 0, to: 3, count: 30 },
      interaction: {
        terms: [
          { form: 'exponential', V0: Q(-2, 'eV'), a: Q(0.1, 'nm') },
          { form: 'deltaShell', g: Q(1, 'eV angstrom'), R: Q(1, 'bohr') },
          { form: 'screenedCoulomb', a: Q(0.5, 'angstrom'), chargeProduct: -2 },
        ],
      },
    }),
    null,
  ],
  [
    'contact',
    document({
      projectile: { species: 'neutron' },
      energy: Q(25, 'meV'),
      interaction: { terms: [{ form: 'contact', b: Q(6, 'fm') }] },
    }),
    null,
  ],
];

describe('the program of the closed formula', () => {
  test.each(CASES)('%s: Python finds what the engine answers', async (_, from, charge) => {
    const snippet = snippetOf(from, charge);
    if ('refused' in snippet) throw new Error(snippet.refused);
    expect(snippet.code).not.toMatch(/NaN|undefined|null|Infinity/);
    if (!python) return;
    const { stdout } = await run(PYTHON, ['-c', snippet.code]);
    const lines = stdout.trim().split('\n');
    expect(lines).toHaveLength(5);
    for (const line of lines) {
      const [, value, deviation] = line.split(' ').map(Number);
      expect(value).toBeGreaterThan(0);
      expect(Math.abs(deviation ?? NaN)).toBeLessThan(1e-10);
    }
  });

  test.each([
    [
      'in the lab',
      document({ frame: 'lab', target: { kind: 'nuclide', nuclide: 'C-12' } }),
      /centre of mass/,
    ],
    [
      'of identical particles',
      document({ target: { kind: 'species', species: 'electron' } }),
      /identical/,
    ],
    [
      'of a form without a short formula',
      withTerms({
        form: 'woodsSaxon',
        V0: Q(-1, 'eV'),
        R: Q(1, 'angstrom'),
        a: Q(0.1, 'angstrom'),
      }),
      /woodsSaxon/,
    ],
    [
      'with the spin of a lepton',
      document({
        energy: Q(1, 'MeV'),
        kinematics: 'relativistic',
        interaction: { terms: [{ form: 'coulomb', chargeProduct: -6 }] },
      }),
      /Spin/,
    ],
    [
      'with a length from a table',
      document({
        projectile: { species: 'neutron' },
        energy: Q(25, 'meV'),
        interaction: { terms: [{ form: 'contact', nuclide: 'Ni-58' }] },
      }),
      /table|incoherent/,
    ],
  ])('%s is refused in words', (_, from, reason) => {
    const snippet = snippetOf(from);
    expect('refused' in snippet ? snippet.refused : '').toMatch(reason);
  });
});

test('the program of the API sends the document with the token of its reader, and prints the curve', async () => {
  let sent: { body: string; authorization: string | undefined } | null = null;
  const server = createServer((request, response) => {
    let body = '';
    request.on('data', (part: Buffer) => (body += part.toString()));
    request.on('end', () => {
      sent = { body, authorization: request.headers.authorization };
      const differential = [{ theta: 60, dcs: 0.25 }];
      response.setHeader('content-type', 'application/json');
      response.end(JSON.stringify({ methods: { born1: { differential } } }));
    });
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  const odd = document({ identical: false, entered: { '/energy': '"100" eV' } });
  const code = apiSnippet(odd, `http://127.0.0.1:${port}`, 'deg');
  expect(code).not.toContain('entered');
  if (python) {
    const env = { ...process.env, TALLYBARN_TOKEN: 'a-token', no_proxy: '*' };
    const { stdout } = await run(PYTHON, ['-c', code], { env });
    expect(stdout.trim()).toBe('60 0.25');
    expect(sent).toMatchObject({ authorization: 'Bearer a-token' });
    const { format, entered, ...rest } = odd;
    expect([format, entered]).not.toContain(null);
    expect(JSON.parse((sent as { body: string } | null)?.body ?? '')).toEqual(rest);
  }
  await new Promise((resolve) => server.close(resolve));
});
