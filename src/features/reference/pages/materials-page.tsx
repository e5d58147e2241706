import { plainDecimal } from '#shared/units/brackets.ts';
import type { MaterialItem } from '#shared/contracts/reference.ts';
import { Select } from '#src/components/select.tsx';
import type { TableAddress } from '../address.ts';
import { materialsTable } from '../api.ts';
import { ChemicalFormula } from '../components/chemical-formula.tsx';
import { TablePage, type TableDescription } from '../components/table-page.tsx';

const PHASES = ['solid', 'liquid', 'gas'] as const;

const TABLE: TableDescription<MaterialItem> = {
  title: 'Materials',
  noun: ['material', 'materials'],
  lead: 'Typical foils, films, liquids and gases to start from. What you weighed or measured is worth more; a case takes the heaviest element as its target.',
  file: 'materials',
  placeholder: 'Name or formula: graphite, H2O',
  source: materialsTable,
  nameOf: ({ label }) => label,
  startOf: ({ key }) => ({ kind: 'material', name: key }),
  filters: { phase: PHASES },
  columns: [
    { key: 'label', title: 'Material', names: true, sortable: true, text: ({ label }) => label },
    {
      key: 'formula',
      title: 'Formula',
      sortable: true,
      text: ({ formula }) => formula,
      cell: ({ formula }) => <ChemicalFormula formula={formula} />,
    },
    { key: 'phase', title: 'Phase', text: ({ phase }) => phase },
    {
      key: 'molarMass',
      title: 'Molar mass',
      unit: 'g/mol',
      sortable: true,
      fileOnly: true,
      number: ({ molarMass }) => ({ value: Number(molarMass.value.toPrecision(6)) }),
    },
    {
      key: 'density',
      title: 'Density',
      unit: 'g/cm3',
      sortable: true,
      firstFalls: true,
      number: ({ density }) => density,
    },
    {
      key: 'range',
      title: 'Sold as',
      spoken: 'range of densities sold',
      unit: 'g/cm3',
      text: ({ range }) =>
        range === null ? '' : `${plainDecimal(range[0].value)} to ${plainDecimal(range[1].value)}`,
    },
    {
      key: 'unitsPerVolume',
      title: 'Units per volume',
      spoken: 'formula units per volume',
      unit: '1/angstrom3',
      wide: true,
      number: ({ unitsPerVolume }) =>
        unitsPerVolume && { value: Number(unitsPerVolume.value.toPrecision(4)) },
    },
    {
      key: 'notes',
      title: 'Before use',
      text: ({ notes }) => notes,
      cell: ({ notes, source }) => (
        <div className="min-w-44 text-sm text-muted" title={source}>
          {notes || '–'}
        </div>
      ),
    },
    {
      key: 'source',
      title: 'Source',
      fileOnly: true,
      text: ({ source }) => source,
    },
  ],
};

function Filters({ address: { query, change } }: { address: TableAddress }) {
  return (
    <Select<'' | (typeof PHASES)[number]>
      aria-label="Phase"
      value={PHASES.find((known) => known === query['phase']) ?? ''}
      choices={[
        { value: '', label: 'Any phase' },
        ...PHASES.map((phase) => ({ value: phase, label: `${phase} only` })),
      ]}
      onChange={(phase) => change({ phase })}
      className="min-w-36 max-sm:flex-1"
    />
  );
}

export default function MaterialsPage() {
  return <TablePage table={TABLE} filters={(address) => <Filters address={address} />} />;
}
