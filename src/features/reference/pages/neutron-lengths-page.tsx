import { TriangleAlert } from 'lucide-react';
import type { NeutronItem } from '#shared/contracts/reference.ts';
import { Select } from '#src/components/select.tsx';
import type { TableAddress } from '../address.ts';
import { neutronTable } from '../api.ts';
import { Cautions } from '../components/cautions.tsx';
import { NuclideSign } from '../components/nuclide-sign.tsx';
import { TablePage, type TableDescription } from '../components/table-page.tsx';

const CAUTIONS = ['resonant', 'contradiction'] as const;

const TABLE: TableDescription<NeutronItem> = {
  title: 'Neutron lengths',
  noun: ['entry', 'entries'],
  lead: 'Bound coherent scattering lengths and cross sections of elements and isotopes for slow neutrons. Where the table contradicts itself, or a resonance makes a value hold at one energy only, the entry says so.',
  file: 'neutron-lengths',
  placeholder: 'Ni, Ni-58 or nickel',
  source: neutronTable,
  nameOf: ({ name }) => name,
  startOf: ({ name, b }) => (b === null ? null : { kind: 'neutron', name }),
  below: ({ cautions }) => (cautions.length > 0 ? <Cautions lines={cautions} /> : null),
  filters: { caution: CAUTIONS, element: [] },
  columns: [
    {
      key: 'name',
      title: 'Nucleus',
      names: true,
      sortable: true,
      text: ({ name }) => name,
      cell: ({ name, isotope, resonant, contradictory }) => (
        <span className="whitespace-nowrap">
          {isotope ? (
            <span className="pl-3 font-normal">
              <NuclideSign nuclide={name} />
            </span>
          ) : (
            name
          )}
          {(resonant || contradictory) && (
            <TriangleAlert
              role="img"
              aria-label="see the cautions"
              className="ml-1.5 inline size-3.5 align-[-0.1em] text-straw"
            />
          )}
        </span>
      ),
    },
    {
      key: 'b',
      title: 'b',
      spoken: 'bound coherent length',
      unit: 'fm',
      sortable: true,
      number: ({ b }) => b,
    },
    {
      key: 'imaginary',
      title: '−b″',
      spoken: 'imaginary part',
      unit: 'fm',
      wide: true,
      number: ({ imaginary }) => imaginary,
    },
    {
      key: 'sigmaCoherent',
      title: 'σ coherent',
      unit: 'barn',
      sortable: true,
      firstFalls: true,
      number: ({ sigmaCoherent }) => sigmaCoherent,
    },
    {
      key: 'sigmaIncoherent',
      title: 'σ incoherent',
      unit: 'barn',
      sortable: true,
      firstFalls: true,
      number: ({ sigmaIncoherent }) => sigmaIncoherent,
    },
    {
      key: 'sigmaAbsorption',
      title: 'σ absorbed, 1.798 Å',
      unit: 'barn',
      sortable: true,
      firstFalls: true,
      number: ({ sigmaAbsorption }) => sigmaAbsorption,
    },
    {
      key: 'cautions',
      title: 'Cautions',
      wide: true,
      text: ({ cautions }) => cautions.join(' '),
      cell: ({ cautions }) => (
        <div className="max-w-md min-w-72">
          <Cautions lines={cautions} />
        </div>
      ),
    },
  ],
};

function Filters({ address: { query, change } }: { address: TableAddress }) {
  const caution = CAUTIONS.find((known) => known === query['caution']) ?? '';
  return (
    <Select<'' | (typeof CAUTIONS)[number]>
      aria-label="Cautions"
      value={caution}
      choices={[
        { value: '', label: 'With and without cautions' },
        { value: 'resonant', label: 'Resonant absorbers only' },
        { value: 'contradiction', label: 'Contradictions only' },
      ]}
      onChange={(value) => change({ caution: value })}
      className="min-w-56 max-sm:flex-1"
    />
  );
}

export default function NeutronLengthsPage() {
  return <TablePage table={TABLE} filters={(address) => <Filters address={address} />} />;
}
