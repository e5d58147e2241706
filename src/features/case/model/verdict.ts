import type { Criterion, Validity } from '#shared/contracts/estimates.ts';
import { formatNumber } from '#shared/units/format.ts';
import { CRITERION_NAMES } from './words.ts';

export const VERDICT_WORDS: Record<
  Validity['verdict'],
  { word: string; tone: 'sound' | 'attention' | 'fault' | 'plain'; sign: string }
> = {
  sound: { word: 'sound', tone: 'sound', sign: '●' },
  usable: { word: 'usable', tone: 'attention', sign: '◐' },
  notValid: { word: 'not valid', tone: 'fault', sign: '○' },
  unassessed: { word: 'not assessed', tone: 'plain', sign: '?' },
};

/** The number that decided, in a line: what it is, its value, and the limit it met or missed. */
export function decidingNumber(validity: Validity): string {
  if (validity.basis === 'exact' && validity.deviation !== undefined) {
    const number = `${formatNumber(100 * validity.deviation, 3)} %`;
    return validity.deviations?.decides === 'weighted'
      ? `${number} from exact, weighted by solid angle`
      : `elastic ${number} from exact`;
  }
  const decides = validity.criteria.find((criterion) => criterion.decides);
  if (decides) return `by criteria: ${criterionText(decides)}`;
  return validity.reason ?? 'no criterion applies';
}

function criterionText({ name, value, limits }: Criterion): string {
  const number = formatNumber(value, 3);
  if (value < limits.sound) return `${CRITERION_NAMES[name]} ${number}, below ${limits.sound}`;
  if (value < limits.usable) return `${CRITERION_NAMES[name]} ${number}, below ${limits.usable}`;
  return `${CRITERION_NAMES[name]} ${number}, above ${limits.usable}`;
}

/** What limits a number, beside it: `numerics 2e-14`. */
export function numericsText(error: {
  relativeError?: number | undefined;
  absoluteError?: number | undefined;
}): string {
  const { relativeError, absoluteError } = error;
  if (relativeError !== undefined) return `numerics ${brief(relativeError)}`;
  return absoluteError === undefined ? '' : `numerics ±${brief(absoluteError)} absolute`;
}

/** One digit, as in 2e-14: an error needs no more. */
export function brief(value: number): string {
  return value === 0 ? '0' : value.toExponential(0).replace('e-', 'e−').replace('e+', 'e');
}
