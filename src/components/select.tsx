import type { ComponentProps } from 'react';
import { ChevronDown } from 'lucide-react';
import { classNames } from '#src/lib/class-names.ts';
import { controlClasses } from './field.tsx';

export interface Choice<T extends string> {
  value: T;
  label: string;
  disabled?: boolean;
}

interface SelectProps<T extends string> extends Omit<
  ComponentProps<'select'>,
  'value' | 'onChange' | 'children'
> {
  value: T;
  choices: ReadonlyArray<Choice<T> | { group: string; choices: ReadonlyArray<Choice<T>> }>;
  onChange: (value: T) => void;
}

function Option<T extends string>({ choice }: { choice: Choice<T> }) {
  return (
    <option value={choice.value} disabled={choice.disabled}>
      {choice.label}
    </option>
  );
}

/** The browser's own menu, dressed: it works with every keyboard, screen reader and telephone. */
export function Select<T extends string>({
  value,
  choices,
  onChange,
  className,
  ...rest
}: SelectProps<T>) {
  const flat = choices.flatMap((entry) => ('group' in entry ? entry.choices : [entry]));
  return (
    <span className={classNames('relative block', className)}>
      <select
        {...rest}
        value={value}
        onChange={(event) => {
          const chosen = flat.find((choice) => choice.value === event.target.value);
          if (chosen) onChange(chosen.value);
        }}
        className={classNames(controlClasses, 'appearance-none pr-8')}
      >
        {choices.map((entry) =>
          'group' in entry ? (
            <optgroup key={entry.group} label={entry.group}>
              {entry.choices.map((choice) => (
                <Option key={choice.value} choice={choice} />
              ))}
            </optgroup>
          ) : (
            <Option key={entry.value} choice={entry} />
          ),
        )}
      </select>
      <ChevronDown
        aria-hidden="true"
        className="pointer-events-none absolute top-1/2 right-2.5 size-4 -translate-y-1/2 text-muted"
      />
    </span>
  );
}
