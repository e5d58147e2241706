import { Link } from 'react-router-dom';
import { plainDecimal } from '#shared/units/brackets.ts';
import type { ElementItem } from '#shared/contracts/reference.ts';
import { elementsTable } from '../api.ts';
import { TablePage, type TableDescription } from '../components/table-page.tsx';

const PHASES = { solid: 'solid', liquid: 'liquid', gas: 'gas', unknown: '' } as const;

function intervalText({ interval }: ElementItem): string {
  return interval === null ? '' : `${plainDecimal(interval[0])} to ${plainDecimal(interval[1])}`;
}

function Isotopes({ item: { symbol, naturalIsotopes, mainIsotope } }: { item: ElementItem }) {
  if (mainIsotope === null) {
    return (
      <Link
        to={`/reference/nuclides?element=${symbol}`}
        className="rounded text-muted hover:underline"
      >
        none in nature
      </Link>
    );
  }
  return (
    <Link
      to={`/reference/nuclides?element=${symbol}&occurrence=natural`}
      className="rounded whitespace-nowrap hover:underline"
    >
      {naturalIsotopes}, most {mainIsotope}
    </Link>
  );
}

const TABLE: TableDescription<ElementItem> = {
  title: 'Elements',
  noun: ['element', 'elements'],
  lead: 'Standard atomic weights and densities at 20 °C. A case takes the most abundant isotope as its target.',
  file: 'elements',
  placeholder: 'Symbol, name or number: Ca, calcium, 20',
  source: elementsTable,
  nameOf: ({ name }) => name,
  startOf: ({ mainIsotope }) =>
    mainIsotope === null ? null : { kind: 'nuclide', name: mainIsotope },
  filters: {},
  columns: [
    {
      key: 'symbol',
      title: 'Element',
      names: true,
      sortable: true,
      text: ({ symbol }) => symbol,
      cell: ({ symbol, name }) => (
        <>
          <span className="inline-block w-7">{symbol}</span>
          <span className="font-normal text-muted">{name}</span>
        </>
      ),
    },
    {
      key: 'atomicNumber',
      title: 'Z',
      spoken: 'atomic number',
      sortable: true,
      number: ({ atomicNumber }) => ({ value: atomicNumber }),
    },
    {
      key: 'weight',
      title: 'Standard weight',
      unit: 'g/mol',
      sortable: true,
      number: ({ weight }) => weight,
    },
    {
      key: 'interval',
      title: 'Varies in nature',
      unit: 'g/mol',
      wide: true,
      text: intervalText,
    },
    { key: 'phase', title: 'Phase', text: ({ phase }) => PHASES[phase] },
    {
      key: 'density',
      title: 'Density',
      unit: 'g/cm3',
      sortable: true,
      firstFalls: true,
      number: ({ density }) => density,
    },
    {
      key: 'densityNote',
      title: 'Of the density',
      wide: true,
      text: ({ densityNote }) => densityNote,
      cell: ({ densityNote }) => <span className="text-sm text-muted">{densityNote}</span>,
    },
    {
      key: 'isotopes',
      title: 'Isotopes',
      text: ({ naturalIsotopes, mainIsotope }) =>
        mainIsotope === null ? 'none in nature' : `${naturalIsotopes}, most ${mainIsotope}`,
      cell: (item) => <Isotopes item={item} />,
    },
  ],
};

export default function ElementsPage() {
  return <TablePage table={TABLE} />;
}
