import { useEffect, useState } from 'react';
import { Search } from 'lucide-react';
import { classNames } from '#src/lib/class-names.ts';
import { controlClasses } from './field.tsx';

const PAUSE_MS = 250;

interface SearchBoxProps {
  id: string;
  label: string;
  placeholder: string;
  value: string;
  onSearch: (q: string) => void;
}

/** Searches while one types, after a short pause. */
export function SearchBox(props: SearchBoxProps) {
  const { id, label, placeholder, value, onSearch } = props;
  const [text, setText] = useState(value);
  const [shown, setShown] = useState(value);

  // Back and forward change the value under the box.
  if (value !== shown) {
    setShown(value);
    if (value !== text.trim()) setText(value);
  }
  useEffect(() => {
    const q = text.trim();
    if (q === value) return;
    const timer = setTimeout(() => onSearch(q), PAUSE_MS);
    return () => clearTimeout(timer);
  }, [text, value, onSearch]);

  return (
    <div role="search" aria-label="This list" className="relative min-w-0 flex-1 basis-64">
      <label htmlFor={id} className="sr-only">
        {label}
      </label>
      <Search
        aria-hidden="true"
        className="pointer-events-none absolute top-1/2 left-2.5 size-4 -translate-y-1/2 text-muted"
      />
      <input
        id={id}
        type="search"
        maxLength={200}
        value={text}
        onChange={(event) => setText(event.target.value)}
        placeholder={placeholder}
        className={classNames(controlClasses, 'bg-sheet! pl-8!')}
      />
    </div>
  );
}
