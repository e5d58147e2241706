import type { SpeciesItem } from '#shared/contracts/reference.ts';
import { speciesTable } from '../api.ts';
import { NuclideSign } from '../components/nuclide-sign.tsx';
import { TablePage, type TableDescription } from '../components/table-page.tsx';
import { signed, spinText } from '../model/words.ts';

const TABLE: TableDescription<SpeciesItem> = {
  title: 'Particles',
  noun: ['particle', 'particles'],
  lead: 'Beams and targets by name. Brackets hold the standard uncertainty of the last digits.',
  file: 'particles',
  placeholder: 'Name or sign: alpha, e−, d',
  source: speciesTable,
  nameOf: ({ label }) => label,
  startOf: ({ key }) => ({ kind: 'species', name: key }),
  filters: {},
  columns: [
    { key: 'label', title: 'Particle', names: true, sortable: true, text: ({ label }) => label },
    {
      key: 'mass',
      title: 'mc²',
      spoken: 'rest energy',
      unit: 'MeV',
      sortable: true,
      number: ({ mass }) => mass,
    },
    {
      key: 'charge',
      title: 'Charge',
      unit: 'e',
      sortable: true,
      text: ({ charge }) => signed(charge),
    },
    { key: 'spin', title: 'Spin', unit: 'ħ', sortable: true, text: ({ spin }) => spinText(spin) },
    { key: 'kind', title: 'Kind', text: ({ kind }) => kind },
    {
      key: 'nuclide',
      title: 'Nucleus of',
      text: ({ nuclide }) => nuclide ?? '',
      cell: ({ nuclide }) =>
        nuclide === null ? (
          <span className="text-muted">–</span>
        ) : (
          <NuclideSign nuclide={nuclide} />
        ),
    },
  ],
};

export default function SpeciesPage() {
  return <TablePage table={TABLE} />;
}
