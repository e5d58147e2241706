import { changeSettingsSchema } from '#shared/contracts/settings.ts';
import type { ChangeSettings, LabSettings } from '#shared/contracts/settings.ts';
import { fullDigits } from '#shared/units/format.ts';
import { readNumber } from '#shared/units/read-number.ts';
import type { Difference } from '#src/components/difference-table.tsx';
import { faultsOf, type Faults } from '#src/lib/form-faults.ts';

/** The thresholds by their place in the settings, in the order of the page. */
export const THRESHOLDS = [
  { basis: 'exact', limit: 'sound', label: 'Sound up to a deviation of' },
  { basis: 'exact', limit: 'usable', label: 'Usable up to a deviation of' },
  { basis: 'criteria', limit: 'sound', label: 'Sound up to a criterion of' },
  { basis: 'criteria', limit: 'usable', label: 'Usable up to a criterion of' },
] as const;
type Threshold = (typeof THRESHOLDS)[number];

export const placeOf = ({ basis, limit }: Threshold): string => `verdict/${basis}/${limit}`;
export type Texts = Readonly<Record<string, string>>;

export function textsOf({ verdict }: LabSettings): Texts {
  return Object.fromEntries(
    THRESHOLDS.map((one) => [placeOf(one), fullDigits(verdict[one.basis][one.limit])]),
  );
}

/** Per cent are read where a plain fraction is meant: 2 % is 0.02. */
function readThreshold(text: string): { value: number } | { fault: string } {
  const read = readNumber(text);
  if (!read.ok) return { fault: read.message };
  if (read.rest === '') return { value: read.value };
  if (read.rest === '%') return { value: Number((read.value / 100).toPrecision(12)) };
  return { fault: `A threshold has no unit; leave “${read.rest}” out.` };
}

/** The change these texts ask for, and what is wrong with it by the names the server will use too. */
export function changeOf(texts: Texts, note: string): { body: ChangeSettings; faults: Faults } {
  const unread: Record<string, string> = {};
  const value = (one: Threshold): number => {
    const place = placeOf(one);
    const read = readThreshold(texts[place] ?? '');
    if ('value' in read) return read.value;
    unread[place] = read.fault;
    return Number.NaN;
  };
  const [exactSound, exactUsable, sound, usable] = THRESHOLDS.map(value);
  const body: ChangeSettings = {
    verdict: {
      exact: { sound: exactSound ?? Number.NaN, usable: exactUsable ?? Number.NaN },
      criteria: { sound: sound ?? Number.NaN, usable: usable ?? Number.NaN },
    },
    ...(note.trim() !== '' && { note }),
  };
  return { body, faults: { ...faultsOf(changeSettingsSchema, body), ...unread } };
}

const NAMES: Record<Threshold['basis'], string> = { exact: 'deviation', criteria: 'criterion' };

export function settingsDifferences(before: LabSettings, after: LabSettings): Difference[] {
  return THRESHOLDS.map((one) => {
    const { basis, limit } = one;
    return {
      key: placeOf(one),
      label: `${limit === 'sound' ? 'Sound' : 'Usable'}, ${NAMES[basis]}`,
      before: fullDigits(before.verdict[basis][limit]),
      after: fullDigits(after.verdict[basis][limit]),
    };
  }).filter((difference) => difference.before !== difference.after);
}
