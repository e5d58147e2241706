import { useState, type ReactNode } from 'react';
import { Check, ChevronDown } from 'lucide-react';
import { formatNumber, fullDigits, unitSymbol } from '#shared/units/format.ts';
import { classNames } from '#src/lib/class-names.ts';

interface FigureProps {
  value: number;
  unit: string;
  /** Significant digits shown; hover, focus and a click give them all. */
  digits?: number;
  size?: 'large' | 'normal';
  /** What the number is, for those who hear the page. */
  label: string;
  /** A menu in place of the unit. */
  unitMenu?: ReactNode;
}

/** `1.23 × 10⁻⁵` with a raised exponent of the same face, which few monospaced fonts hold as signs. */
export function Power({ text }: { text: string }) {
  const match = /^(.*×\s10)([⁻⁰¹²³⁴-⁹]+)$/u.exec(text);
  if (!match) return text;
  const exponent = (match[2] ?? '').normalize('NFKC').replace('-', '−');
  return (
    <>
      {match[1]}
      <sup className="align-[0.45em] text-[0.7em] leading-none">{exponent}</sup>
    </>
  );
}

/** A computed number: without brackets, all digits on hover and focus, copied whole by a click. */
export function Figure({ value, unit, digits = 4, size = 'normal', label, unitMenu }: FigureProps) {
  const [copied, setCopied] = useState(false);
  const full = `${fullDigits(value)} ${unit}`;

  async function copy(): Promise<void> {
    await navigator.clipboard.writeText(full);
    setCopied(true);
  }

  return (
    <span className="inline-flex items-baseline gap-1.5 whitespace-nowrap">
      <button
        type="button"
        className={classNames(
          'group relative rounded font-mono underline-offset-4 hover:underline hover:decoration-dotted',
          size === 'large' ? 'text-xl font-medium' : 'text-base',
        )}
        aria-label={`${label}: ${fullDigits(value)} ${unitSymbol(unit)}. Copy all digits.`}
        onClick={() => void copy()}
        onBlur={() => setCopied(false)}
        onMouseLeave={() => setCopied(false)}
      >
        <Power text={formatNumber(value, digits)} />
        <span
          aria-hidden="true"
          className="pointer-events-none absolute top-full left-0 z-20 mt-1 hidden items-center gap-1 rounded border border-line bg-sheet px-2 py-1 font-mono text-sm font-normal text-ink shadow group-hover:flex group-focus-visible:flex"
        >
          {copied && <Check className="size-4 text-field" />}
          {copied ? 'copied' : `${fullDigits(value)} ${unitSymbol(unit)}`}
        </span>
      </button>
      {unitMenu ?? <span className="text-sm text-muted">{unitSymbol(unit)}</span>}
      <span role="status" className="sr-only">
        {copied ? `${label} copied` : ''}
      </span>
    </span>
  );
}

const AREA_CHOICES = ['angstrom2', 'barn', 'millibarn', 'bohr2', 'fm2', 'nm2', 'cm2'];

interface AreaUnitMenuProps {
  unit: string;
  onChange: (unit: string) => void;
  label: string;
}

/** The unit where the number stands, as a menu: it converts what is shown, never relabels it. */
export function AreaUnitMenu({ unit, onChange, label }: AreaUnitMenuProps) {
  const choices = AREA_CHOICES.includes(unit) ? AREA_CHOICES : [unit, ...AREA_CHOICES];
  return (
    <span className="relative inline-flex items-center text-sm text-muted hover:text-ink">
      <select
        aria-label={label}
        value={unit}
        onChange={(event) => onChange(event.target.value)}
        className="appearance-none rounded bg-transparent pr-4 field-sizing-content"
      >
        {choices.map((choice) => (
          <option key={choice} value={choice} className="bg-sheet text-ink">
            {unitSymbol(choice)}
          </option>
        ))}
      </select>
      <ChevronDown
        aria-hidden="true"
        className="pointer-events-none absolute right-0 size-3.5"
        data-screen-only
      />
    </span>
  );
}
