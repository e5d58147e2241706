/**
 * Writes server/physics/tables/nuclides/ame2012.json.
 *
 *   node scripts/reference/nuclides/generate.mjs PATH_TO_CHEMICAL_ELEMENTS PATH_TO_NSF_PY
 *
 * PATH_TO_CHEMICAL_ELEMENTS: the npm package chemical-elements 2.3.3 (MIT), unpacked. Its masses and abundances are those of NIST's
 * "Atomic Weights and Isotopic Compositions" 4.1 (2015): AME2012 masses, IUPAC 2009 representative compositions (Berglund and Wieser 2011).
 * PATH_TO_NSF_PY: periodictable/nsf.py of Debian's python3-periodictable 1.6.0 (public domain), whose table of neutron scattering lengths
 * (Rauch and Waschkowski 2003) prints the nuclear spin of each isotope.
 */
import { readFileSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { resolve } from 'node:path';
import process from 'node:process';

const [elementsPath, spinsPath] = process.argv.slice(2);
if (!elementsPath || !spinsPath) {
  throw new Error('Usage: generate.mjs PATH_TO_CHEMICAL_ELEMENTS PATH_TO_NSF_PY');
}
const require = createRequire(import.meta.url);
const { elementsAndIsotopes } = require(resolve(elementsPath, 'lib/src/elementsAndIsotopes.js'));

/** Ground-state spins that the source of spins does not print (radioactive nuclides used as beams, tracers or targets) or misprints. From memory. */
const HAND_TYPED_SPINS = {
  'Li-8': 2,
  'Li-9': 1.5,
  'Be-7': 1.5,
  'Be-11': 0.5,
  'C-11': 1.5,
  'N-13': 0.5,
  'O-15': 0.5,
  'F-17': 2.5,
  'F-18': 1,
  'Na-22': 3,
  'Na-24': 4,
  'Al-26': 5,
  'P-32': 1,
  'Co-57': 3.5,
  'Co-60': 5,
  'Tc-99': 4.5,
  'I-131': 3.5,
  'Cs-137': 3.5,
  'U-233': 2.5,
  'Np-237': 2.5,
  'Pu-239': 0.5,
  'Am-241': 2.5,
  // Misprinted as 0 in the source.
  'Se-77': 0.5,
  'Hf-177': 3.5,
  'Hg-199': 0.5,
};

function readSpins(path) {
  const spins = new Map();
  for (const line of readFileSync(path, 'latin1').split('\n')) {
    const match = /^\d+-([A-Z][a-z]?)-(\d+),[^,]*,(\d+)(?:\/(2))?,/.exec(line);
    if (match) spins.set(`${match[1]}-${match[2]}`, Number(match[3]) / (match[4] ? 2 : 1));
  }
  return spins;
}

const printed = readSpins(spinsPath);
const clashes = [];

function spinOf(name, z, a) {
  const known = HAND_TYPED_SPINS[name] ?? printed.get(name);
  if (z % 2 === 0 && a % 2 === 0) {
    if (known !== undefined && known !== 0) clashes.push(`${name}: ${known} printed, even-even`);
    return 0;
  }
  // A half-integer spin goes with an odd mass number; anything else is a misprint and is left out.
  if (known !== undefined && (2 * known) % 2 !== a % 2) {
    clashes.push(`${name}: ${known} printed`);
    return null;
  }
  return known ?? null;
}

/** Masses printed to fewer than five decimals are mostly extrapolated; C-12 is exact. */
const precise = (mass) => (String(mass).split('.')[1] ?? '').length >= 5;

const nuclides = [];
for (const { number, symbol, isotopes } of elementsAndIsotopes) {
  for (const { nominal, mass, abundance } of isotopes) {
    if (!(abundance > 0) && !precise(mass)) continue;
    const name = `${symbol}-${nominal}`;
    nuclides.push([name, mass, abundance > 0 ? abundance : null, spinOf(name, number, nominal)]);
  }
}

const table = {
  edition: 'AME2012',
  masses:
    'Atomic masses in u: Wang et al., Chinese Physics C 36 (2012) 1603 (AME2012), as printed by NIST, Atomic Weights and Isotopic Compositions 4.1 (2015)',
  abundances:
    'Mole fractions: Berglund and Wieser, Pure Appl. Chem. 83 (2011) 397 (IUPAC 2009), the same NIST compilation; ordinary terrestrial material, H, Li, B, C, N, O and others vary',
  spins:
    'Ground states (Ta-180: the isomer found in nature). Even-even nuclides 0; others Rauch and Waschkowski, Neutron Data Booklet (2003), as carried by periodictable 1.6.0 (public domain); ' +
    `from memory: ${Object.keys(HAND_TYPED_SPINS).join(' ')}; null where unknown`,
  obtainedFrom:
    'npm chemical-elements 2.3.3 (MIT licence), Debian python3-periodictable 1.6.0 (public domain)',
  generator: 'scripts/reference/nuclides/generate.mjs',
  leftOut:
    'Nuclides whose mass is printed to fewer than five decimals and that do not occur in nature',
  columns: ['nuclide', 'atomicMass', 'abundance', 'spin'],
  elements: elementsAndIsotopes.map(({ symbol }) => symbol),
  nuclides,
};
const target = new URL('../../../server/physics/tables/nuclides/ame2012.json', import.meta.url);
// A nuclide a line: the table is read in reviews.
const rows = nuclides.map((row) => `    ${JSON.stringify(row).replaceAll(',', ', ')}`).join(',\n');
const head = JSON.stringify({ ...table, nuclides: [] }, null, 2).replace(
  '"nuclides": []',
  () => `"nuclides": [\n${rows}\n  ]`,
);
writeFileSync(target, `${head}\n`);
process.stdout.write(
  `${nuclides.length} nuclides, ${clashes.length} spins left out or overruled: ${clashes.join('; ')}\n`,
);
