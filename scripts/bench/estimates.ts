import { startApplication, stopApplication } from '../drill/application.ts';
import { temporaryPlace } from '../drill/temporary-place.ts';
import { shown, summary } from './measure.ts';

const METHODS = ['born1', 'born2', 'eikonal', 'partialWaves'];
const CREDENTIALS = { email: 'theorist@lowmoor.example', password: 'lowmoor-demo' };

interface Load {
  name: string;
  methods: readonly string[];
  requests: number;
  wanted: string;
}
const LOADS: readonly Load[] = [
  { name: 'first order', methods: ['born1'], requests: 300, wanted: '10 ms' },
  { name: 'all four methods', methods: METHODS, requests: 60, wanted: '100 ms' },
];

function bodyAt(energy: number, methods: readonly string[]) {
  return {
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 0 },
    energy: { value: energy, unit: 'eV' },
    interaction: {
      terms: [
        {
          form: 'yukawa',
          V0: { value: -10, unit: 'eV' },
          a: { value: 1, unit: 'angstrom' },
        },
      ],
    },
    methods,
    angles: { unit: 'deg', from: 0, to: 180, count: 181 },
  };
}

async function post(url: string, body: unknown, cookie = ''): Promise<Response> {
  const headers = { 'content-type': 'application/json', origin: new URL(url).origin, cookie };
  const answer = await fetch(url, { method: 'POST', headers, body: JSON.stringify(body) });
  if (!answer.ok) throw new Error(`${url} answered ${answer.status}: ${await answer.text()}`);
  return answer;
}

/** Every request has an energy of its own: nothing is answered from memory. */
async function benchLoad(base: string, cookie: string, load: Load): Promise<void> {
  const { name, methods, requests, wanted } = load;
  const times: number[] = [];
  for (let i = -requests / 6; i < requests; i++) {
    const begun = performance.now();
    await (await post(`${base}/api/estimates`, bodyAt(400 + i, methods), cookie)).json();
    if (i >= 0) times.push((performance.now() - begun) / 1e3);
  }
  const { best, median } = summary(times);
  console.log(
    `\nPOST /api/estimates, ${name}, 181 angles, ${requests} requests: ${shown(best)} best, ${shown(median)} median, wanted below ${wanted}`,
  );
}

/** POST /api/estimates of 181 angles, one after another over loopback, from a fresh application. */
export async function benchEstimates(): Promise<void> {
  const place = await temporaryPlace();
  const application = await startApplication(place);
  try {
    const base = `http://127.0.0.1:${place.port}`;
    const signedIn = await post(`${base}/api/auth/sign-in`, CREDENTIALS);
    const cookie = signedIn.headers
      .getSetCookie()
      .map((line) => line.split(';')[0])
      .join('; ');
    for (const load of LOADS) await benchLoad(base, cookie, load);
  } finally {
    await stopApplication(application);
    place.remove();
  }
}
