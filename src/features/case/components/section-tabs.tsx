import { Link, useLocation, useSearchParams } from 'react-router-dom';
import { classNames } from '#src/lib/class-names.ts';

export const SECTIONS = ['cross-section', 'golden-rule', 'validity', 'run-plan', 'record'] as const;
export type Section = (typeof SECTIONS)[number];

const NAMES: Record<Section, string> = {
  'cross-section': 'Cross section',
  'golden-rule': 'Golden rule',
  validity: 'Validity',
  'run-plan': 'Run plan',
  record: 'Record',
};

/** The section in the address; the first when none is named. */
export function useSection(): Section {
  const [parameters] = useSearchParams();
  const named = parameters.get('section');
  return SECTIONS.find((section) => section === named) ?? 'cross-section';
}

/** Where each section of the case on the page is found. */
export function useSectionAddress(): (name: Section) => { search: string; hash: string } {
  // A case that stands in the fragment of the address stays there.
  const { search, hash } = useLocation();
  return (name) => {
    const parameters = new URLSearchParams(search);
    if (name === 'cross-section') parameters.delete('section');
    else parameters.set('section', name);
    return { search: parameters.toString(), hash };
  };
}

/** The parts of a case, each with an address of its own. */
export function SectionTabs({ section }: { section: Section }) {
  const addressOf = useSectionAddress();
  return (
    <nav aria-label="Sections of the case" className="mb-4.5 border-b border-line" data-screen-only>
      <ul className="flex gap-6 overflow-x-auto">
        {SECTIONS.map((name) => (
          <li key={name}>
            <Link
              to={addressOf(name)}
              state={{ keepFocus: true }}
              aria-current={name === section ? 'page' : undefined}
              className={classNames(
                '-mb-px block border-b-2 py-2 whitespace-nowrap outline-offset-[-2px]',
                name === section
                  ? 'border-barn font-semibold'
                  : 'border-transparent text-muted hover:text-ink',
              )}
            >
              {NAMES[name]}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
