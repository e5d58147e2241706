import { useId, type ReactNode } from 'react';
import { classNames } from '#src/lib/class-names.ts';

interface SegmentedProps<T extends string> {
  /** What is chosen, for those who do not see the group. */
  label: string;
  value: T;
  choices: ReadonlyArray<{ value: T; label: string; icon?: ReactNode }>;
  onChange: (value: T) => void;
  /** Show the pictures alone; the words are then spoken and shown on hover. */
  iconsOnly?: boolean;
  size?: 'normal' | 'small';
}

/** One of a few, all in sight: radio buttons in a row, so that arrow keys walk them. */
export function Segmented<T extends string>(props: SegmentedProps<T>) {
  const { label, value, choices, onChange, iconsOnly = false, size = 'small' } = props;
  const name = useId();
  return (
    <fieldset className="inline-flex rounded border border-edge bg-sheet p-px">
      <legend className="sr-only">{label}</legend>
      {choices.map((choice) => (
        <label
          key={choice.value}
          title={iconsOnly ? choice.label : undefined}
          className={classNames(
            'relative flex cursor-pointer items-center justify-center gap-1.5 rounded whitespace-nowrap text-muted',
            'has-checked:bg-soft has-checked:font-semibold has-checked:text-ink hover:text-ink',
            'has-focus-visible:outline-2 has-focus-visible:outline-ink has-focus-visible:outline-offset-2',
            size === 'small' ? 'min-h-7 min-w-7 px-2 text-sm' : 'min-h-8 min-w-8 px-3',
          )}
        >
          <input
            type="radio"
            name={name}
            value={choice.value}
            checked={choice.value === value}
            onChange={() => onChange(choice.value)}
            className="absolute inset-0 cursor-pointer opacity-0"
          />
          {choice.icon}
          <span className={iconsOnly ? 'sr-only' : undefined}>{choice.label}</span>
        </label>
      ))}
    </fieldset>
  );
}
