import { writeFileSync } from 'node:fs';
import { ENGINE } from '#server/compute/engine-kinds.ts';
import { VERSION } from '#server/version.ts';
import { DEMO_CASES } from '#server/db/seeders/demo/seed-demo.ts';
import { keyDigits } from '#tests/server/demo/key-digits.ts';

// npx tsx scripts/freeze-demo.ts: writes what this version computes for the demo. A frozen file is made once, when its
// version is released, and not again: a later engine is compared with it, or gets a file of its own.
const records = Object.fromEntries(
  DEMO_CASES.flatMap(({ title, versions }) =>
    versions.map(({ document }, index) => [
      `${title}, version ${index + 1}`,
      keyDigits(ENGINE.estimate(document)),
    ]),
  ),
);
const file = new URL(`../tests/server/demo/frozen-${VERSION}.json`, import.meta.url);
const frozen = { madeBy: 'scripts/freeze-demo.ts', engine: { version: VERSION }, records };
writeFileSync(file, `${JSON.stringify(frozen, null, 2)}\n`);
