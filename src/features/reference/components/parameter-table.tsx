import type { FormParameterInfo } from '#shared/contracts/forms.ts';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import { Formula } from '#src/components/formula.tsx';

/** A number as a person would write it: 1e-12, 0.5, −10. */
function plain(value: number): string {
  return formatNumber(value, 12)
    .replace(/(\.\d*?)0+(?=$|\s)/, '$1')
    .replace(/\.(?=$|\s)/, '');
}

/** A default of whatever kind the register has: quantity, number, name, or points. */
function startText(start: unknown): string {
  if (typeof start === 'number') return plain(start);
  if (typeof start === 'string') return start;
  if (Array.isArray(start)) return `${start.length} points (r, V)`;
  if (typeof start !== 'object' || start === null) return '';
  if (!('value' in start)) {
    return Object.entries(start)
      .map(([name, value]) => `${name} = ${startText(value)}`)
      .join(', ');
  }
  return typeof start.value === 'number' ? `${plain(start.value)}${unitOf(start)}` : '';
}

function unitOf(start: unknown): string {
  const named = typeof start === 'object' && start !== null && 'unit' in start;
  return named && typeof start.unit === 'string' ? ` ${unitSymbol(start.unit)}` : '';
}

function rangeText({ minimum, maximum, exclusiveMinimum = false, ...rest }: FormParameterInfo) {
  const least = minimum === undefined ? [] : [exclusiveMinimum ? 'above' : 'from', plain(minimum)];
  const most = maximum === undefined ? [] : ['to', plain(maximum)];
  const words = [...least, ...most];
  return words.length === 0 ? '' : `${words.join(' ')}${unitOf(rest.default)}`;
}

/** What a parameter may be, and when it is asked for, in words. */
function boundsText(parameter: FormParameterInfo): string {
  const { choices, integer, optional, when, oneOf } = parameter;
  const parts = [
    choices ? choices.join(', ') : rangeText(parameter),
    integer ? 'whole number' : '',
    optional ? 'may be left out' : '',
    when ? `with ${when.key} ${when.is.join(' or ')} only` : '',
    oneOf === undefined ? '' : 'one of its alternatives is given',
  ];
  return parts.filter((part) => part !== '').join('; ') || 'any';
}

const KINDS: Readonly<Record<string, string>> = {
  number: 'number',
  energyLength: 'energy × length',
  choice: 'one of a list',
  points: 'points (r, V)',
  quantities: 'quantities by name',
};

/** The parameters of a form with what they mean, what they may be and where they begin. */
export function ParameterTable({ parameters }: { parameters: readonly FormParameterInfo[] }) {
  if (parameters.length === 0) {
    return <p className="text-muted">This form has no parameters: beam and target decide it.</p>;
  }
  return (
    <div
      role="region"
      aria-label="Parameters"
      tabIndex={0}
      className="relative overflow-x-auto rounded border border-line bg-sheet"
    >
      <table className="w-full border-collapse text-left">
        <caption className="sr-only">Parameters of the form</caption>
        <thead className="border-b border-line text-sm text-muted">
          <tr>
            {['Sign', 'Parameter', 'Begins at', 'May be', 'Meaning'].map((heading) => (
              <th key={heading} scope="col" className="px-3 py-2 font-semibold whitespace-nowrap">
                {heading}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {parameters.map((parameter) => {
            const { key, label, symbol, dimension, description } = parameter;
            return (
              <tr key={key} className="border-t border-line/70 align-top first:border-t-0">
                <th scope="row" className="px-3 py-2 font-normal">
                  <Formula tex={symbol} />
                  <code className="block text-xs text-muted">{key}</code>
                </th>
                <td className="px-3 py-2">
                  {label}
                  <span className="block text-xs text-muted">{KINDS[dimension] ?? dimension}</span>
                </td>
                <td className="px-3 py-2 font-mono text-sm whitespace-nowrap">
                  {startText(parameter.default)}
                </td>
                <td className="min-w-40 px-3 py-2 text-sm">{boundsText(parameter)}</td>
                <td className="min-w-60 px-3 py-2 text-sm text-muted">{description}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
