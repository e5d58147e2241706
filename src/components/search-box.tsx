import { useEffect, useState, type Ref } from 'react';
import { Search } from 'lucide-react';
import { classNames } from '#src/lib/class-names.ts';
import { controlClasses } from './field.tsx';
import { Kbd } from './kbd.tsx';

const PAUSE_MS = 250;

interface SearchBoxProps {
  id: string;
  label: string;
  placeholder: string;
  value: string;
  onSearch: (q: string) => void;
  /** The key that leads here, shown while the box is empty. */
  hotkey?: string | undefined;
  ref?: Ref<HTMLInputElement>;
}

/** Searches while one types, after a short pause. */
export function SearchBox(props: SearchBoxProps) {
  const { id, label, placeholder, value, onSearch, hotkey, ref } = props;
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
    <div role="search" className="relative min-w-0 flex-1 basis-64">
      <label htmlFor={id} className="sr-only">
        {label}
      </label>
      <Search
        aria-hidden="true"
        className="pointer-events-none absolute top-1/2 left-2.5 size-4 -translate-y-1/2 text-muted"
      />
      <input
        ref={ref}
        id={id}
        type="search"
        maxLength={200}
        value={text}
        onChange={(event) => setText(event.target.value)}
        placeholder={placeholder}
        className={classNames(controlClasses, 'bg-sheet! pr-10 pl-8!')}
      />
      {hotkey && text === '' && (
        <span
          aria-hidden="true"
          className="pointer-events-none absolute top-1/2 right-2 -translate-y-1/2 max-lg:hidden"
        >
          <Kbd>{hotkey}</Kbd>
        </span>
      )}
    </div>
  );
}
