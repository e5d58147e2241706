/** Hostile formulas and tables against a running application while someone else asks for small things: `npm run drill:hostile`. */
import { setTimeout as sleep } from 'node:timers/promises';
import { startApplication, stopApplication } from './drill/application.ts';
import { startBystander } from './drill/start-bystander.ts';
import { temporaryPlace } from './drill/temporary-place.ts';

const CREDENTIALS = { email: 'theorist@lowmoor.example', password: 'lowmoor-demo' };
const AFTERWARDS_MILLISECONDS = 500;
const eV = (value: number) => ({ value, unit: 'eV' });
const angstrom = (value: number) => ({ value, unit: 'angstrom' });

function formula(text: string) {
  return {
    form: 'expression',
    formula: text,
    parameters: { V0: eV(-10), a: angstrom(1), R: angstrom(3) },
  };
}

function table(points: unknown) {
  return { form: 'tabulated', lengthUnit: 'angstrom', energyUnit: 'eV', points, tail: 'zero' };
}

const rows = (count: number) => Array.from({ length: count }, (_, i) => [i * 0.01, -1 / (1 + i)]);

const HOSTILE: [string, unknown][] = [
  // What the others take when nobody is hostile: the ground to read the rest against.
  ['nothing hostile', { form: 'yukawa', V0: eV(-10), a: angstrom(1) }],
  ['a loop', formula('while(1)')],
  ['globals', formula('constructor.constructor("return process")()')],
  ['2,000 deep', formula(`${'('.repeat(999)}r${')'.repeat(999)}`)],
  ['a tower of powers', formula(Array(900).fill('2').join('^'))],
  ['an allocation', formula('[1:1e9]')],
  ['wild oscillation', formula('V0*sin(exp(exp(r/a)))*exp(-r/a)')],
  ['270 parts', formula(`V0*exp(-r/a)*(${Array(270).fill('r/a').join('-')})`)],
  ['a table out of order', table([...rows(50), [0.1, 1], ...rows(50)])],
  ['a table with a gap', table([...rows(50), [90, -1e-3], [90.01, -1e-3], [90.02, -1e-3]])],
  ['a table of 50,000 rows', table(rows(50_000))],
  ['a table of 1e6 rows', table(rows(1_000_000))],
];

function body(term: unknown): string {
  return JSON.stringify({
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 0 },
    energy: eV(100),
    interaction: { terms: [term] },
    methods: ['born1'],
  });
}

const place = await temporaryPlace();
const application = await startApplication(place);
const bystander = startBystander();
const base = `http://127.0.0.1:${place.port}`;
let cookie = '';

async function post(path: string, text: string): Promise<Response> {
  const headers = { 'content-type': 'application/json', origin: base, cookie };
  return fetch(base + path, { method: 'POST', headers, body: text });
}

try {
  const signedIn = await post('/api/auth/sign-in', JSON.stringify(CREDENTIALS));
  cookie = signedIn.headers
    .getSetCookie()
    .map((line) => line.split(';')[0])
    .join('; ');
  const small = body({ form: 'yukawa', V0: eV(-10), a: angstrom(1) });
  // Both threads have loaded the parser before anything is measured, as in a day's use.
  const warm = body(formula('V0*exp(-r/a)'));
  for (let i = 0; i < 4; i++) {
    await Promise.all(Array.from({ length: 8 }, () => post('/api/estimates', warm)));
  }
  for (const [name, term] of HOSTILE) {
    const text = body(term);
    const others = await bystander.begin({
      url: `${base}/api/estimates`,
      headers: { 'content-type': 'application/json', origin: base, cookie },
      body: small,
    });
    const begun = performance.now();
    const answer = await post('/api/estimates', text);
    const { detail = 'answered' } = (await answer.json()) as { detail?: string };
    const took = performance.now() - begun;
    // What a refusal leaves behind (collecting garbage, a thread begun anew) may come after it.
    await sleep(AFTERWARDS_MILLISECONDS);
    const times = await others.end();
    const worst = Math.max(...times);
    console.log(
      `${name.padEnd(24)} ${answer.status} in ${took.toFixed(0).padStart(5)} ms; others at most ${worst.toFixed(0).padStart(4)} ms (${times.length}); ${detail.slice(0, 90)}`,
    );
  }
} finally {
  bystander.stop();
  await stopApplication(application);
  place.remove();
}
