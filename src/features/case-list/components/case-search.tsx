import { SearchBox } from '#src/components/search-box.tsx';

/** The search of the cases alone; the one of the top bar looks through everything. */
export function CaseSearch({ value, onSearch }: { value: string; onSearch: (q: string) => void }) {
  return (
    <SearchBox
      id="case-search"
      label="Search the cases"
      placeholder="Number, title, particle, nuclide or form"
      value={value}
      onSearch={onSearch}
    />
  );
}
