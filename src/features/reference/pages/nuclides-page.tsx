import { X } from 'lucide-react';
import { Link } from 'react-router-dom';
import type { NuclideItem } from '#shared/contracts/reference.ts';
import { Segmented } from '#src/components/segmented.tsx';
import type { TableAddress } from '../address.ts';
import { nuclidesTable } from '../api.ts';
import { NuclideSign } from '../components/nuclide-sign.tsx';
import { TablePage, type TableDescription } from '../components/table-page.tsx';
import { percent, spinText } from '../model/words.ts';

const TABLE: TableDescription<NuclideItem> = {
  title: 'Nuclides',
  noun: ['nuclide', 'nuclides'],
  lead: 'Atomic masses, abundances and ground-state spins. A nuclide’s own page adds charge radius and neutron length.',
  file: 'nuclides',
  placeholder: 'Ca-40, 40Ca or calcium',
  source: nuclidesTable,
  nameOf: ({ nuclide }) => nuclide,
  startOf: ({ nuclide }) => ({ kind: 'nuclide', name: nuclide }),
  filters: { occurrence: ['natural'], element: [] },
  columns: [
    {
      key: 'nuclide',
      title: 'Nuclide',
      names: true,
      text: ({ nuclide }) => nuclide,
      cell: ({ nuclide }) => (
        <Link to={`/reference/nuclides/${nuclide}`} className="rounded hover:underline">
          <NuclideSign nuclide={nuclide} />
        </Link>
      ),
    },
    { key: 'element', title: 'Element', wide: true, text: ({ element }) => element },
    {
      key: 'atomicNumber',
      title: 'Z',
      spoken: 'atomic number',
      sortable: true,
      number: ({ atomicNumber }) => ({ value: atomicNumber }),
    },
    {
      key: 'massNumber',
      title: 'A',
      spoken: 'mass number',
      sortable: true,
      number: ({ massNumber }) => ({ value: massNumber }),
    },
    {
      key: 'atomicMass',
      title: 'Atomic mass',
      unit: 'u',
      sortable: true,
      number: ({ atomicMass }) => atomicMass,
    },
    {
      key: 'abundance',
      title: 'In nature',
      unit: '%',
      sortable: true,
      firstFalls: true,
      number: ({ abundance }) => (abundance === null ? null : { value: percent(abundance) }),
    },
    {
      key: 'spin',
      title: 'Spin',
      unit: 'ħ',
      sortable: true,
      text: ({ spin }) => (spin === null ? '' : spinText(spin)),
    },
  ],
};

function Filters({ address: { query, change, hrefWith } }: { address: TableAddress }) {
  const element = query['element'];
  return (
    <>
      <Segmented
        label="Occurrence"
        size="normal"
        value={query['occurrence'] === 'natural' ? 'natural' : 'all'}
        choices={[
          { value: 'all', label: 'All' },
          { value: 'natural', label: 'In nature' },
        ]}
        onChange={(occurrence) =>
          change({ occurrence: occurrence === 'all' ? undefined : occurrence })
        }
      />
      {typeof element === 'string' && (
        <Link
          to={hrefWith({ element: undefined })}
          state={{ keepFocus: true }}
          className="inline-flex min-h-9 items-center gap-1.5 rounded bg-slate-soft px-2.5 text-sm text-slate hover:underline"
        >
          isotopes of {element}
          <X aria-hidden="true" className="size-4" />
          <span className="sr-only">Show nuclides of every element</span>
        </Link>
      )}
    </>
  );
}

export default function NuclidesPage() {
  return <TablePage table={TABLE} filters={(address) => <Filters address={address} />} />;
}
