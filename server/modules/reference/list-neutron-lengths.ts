import type { z } from 'zod';
import type { Measured, NeutronItem, neutronQuerySchema } from '#shared/contracts/reference.ts';
import {
  ABSORPTION_CONTRADICTIONS,
  DIFFERS_FROM_SEARS,
  NEUTRON_ENTRIES,
} from '#server/physics/tables/neutron-lengths.ts';
import type * as table from '#server/physics/tables/neutron-lengths.ts';
import { elementName, OTHER_NAMES } from './find-nuclides.ts';
import { fitting, rank } from './match.ts';
import { ordered, pageOf } from './paging.ts';
import { HEADS } from './table-heads.ts';

type Entry = table.NeutronEntry;

const symbolOf = (name: string): string => name.split('-')[0] ?? name;

function measured(entry: table.Measured | null, unit: string): Measured | null {
  if (entry === null) return null;
  const { value, uncertainty } = entry;
  return { value, unit, ...(uncertainty !== null && { uncertainty }) };
}

/** The table's own remark as a sentence; a sign keeps its case. */
function inWords(remark: string): string {
  const plain = remark
    .replaceAll('sigma_abs', 'the absorption')
    .replaceAll('sigma_inc', 'the incoherent cross section')
    .replaceAll('sigma_coh', 'the coherent cross section');
  const first = /^[a-z]{2}/.test(plain) ? plain.charAt(0).toUpperCase() : plain.charAt(0);
  return `${first}${plain.slice(1)}.`;
}

function cautionsOf(entry: Entry): string[] {
  const { name, resonant, contradiction, sigmaCoherent, sigmaAbsorption, remark } = entry;
  const implied = ABSORPTION_CONTRADICTIONS.get(name);
  const sears = DIFFERS_FROM_SEARS.find(({ symbol }) => symbol === name);
  return [
    resonant &&
      'Resonant: the absorption does not follow 1/v and b changes with energy; the values hold near 25 meV only.',
    contradiction !== null &&
      `Contradiction: 4π|b|² gives ${contradiction} b, the printed coherent cross section is ${sigmaCoherent?.value ?? 'missing'} b.`,
    implied !== undefined &&
      `Contradiction: the imaginary part implies an absorption of ${implied} b, ${sigmaAbsorption?.value ?? 'none'} b is printed.`,
    sears && `Sears (1992) has b = ${sears.sears} fm.`,
    remark !== '' && inWords(remark),
  ].filter((line): line is string => typeof line === 'string');
}

const isContradictory = ({ name, contradiction }: Entry): boolean =>
  contradiction !== null || ABSORPTION_CONTRADICTIONS.has(name);

export function presentNeutron(entry: Entry): NeutronItem {
  const { name, b, imaginary, sigmaCoherent, sigmaIncoherent, sigmaAbsorption } = entry;
  return {
    name,
    symbol: symbolOf(name),
    isotope: name.includes('-'),
    b: measured(b, 'fm'),
    imaginary: imaginary === null ? null : { value: imaginary, unit: 'fm' },
    sigmaCoherent: measured(sigmaCoherent, 'barn'),
    sigmaIncoherent: measured(sigmaIncoherent, 'barn'),
    sigmaAbsorption: measured(sigmaAbsorption, 'barn'),
    resonant: entry.resonant,
    contradictory: isContradictory(entry),
    cautions: cautionsOf(entry),
  };
}

function rankNeutron(q: string, { name }: Entry): number | null {
  const symbol = symbolOf(name);
  const mass = name.split('-')[1] ?? '';
  const element = elementName(symbol);
  const names = [name, `${symbol}${mass}`, `${mass}${symbol}`, `${element} ${mass}`.trim()];
  return rank(q, { names: [...names, ...(OTHER_NAMES[symbol] ?? [])] });
}

export function listNeutronLengths(query: z.output<typeof neutronQuerySchema>) {
  const { q = '', element, caution } = query;
  const kept = fitting(NEUTRON_ENTRIES, (entry) => rankNeutron(q, entry)).filter(
    (entry) =>
      (element === undefined || symbolOf(entry.name) === element) &&
      (caution !== 'resonant' || entry.resonant) &&
      (caution !== 'contradiction' || isContradictory(entry)),
  );
  const sorted = ordered(kept, query.sort, {
    name: (item) => item.name,
    b: (item) => item.b?.value ?? null,
    sigmaCoherent: (item) => item.sigmaCoherent?.value ?? null,
    sigmaIncoherent: (item) => item.sigmaIncoherent?.value ?? null,
    sigmaAbsorption: (item) => item.sigmaAbsorption?.value ?? null,
  });
  const { items, ...page } = pageOf(sorted, query);
  return { ...page, items: items.map(presentNeutron), table: HEADS.neutronLengths };
}
