import { describe, expect, test } from 'vitest';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import { differences } from '#src/features/case/model/fields.ts';
import type { Content } from '#src/features/case/model/fields.ts';
import { compareWork, mergeWork } from '#src/features/case/model/merge.ts';
import { same } from '#src/lib/same.ts';

const parameter = (key: string, label: string, dimension: string) => ({
  key,
  label,
  symbol: key,
  dimension,
  default: { value: 1, unit: 'eV' },
  description: '',
});
const form = (key: string, label: string): FormInfo => ({
  key,
  label,
  formula: '',
  transformFormula: '',
  source: '',
  parameters: [parameter('V0', 'strength', 'energy'), parameter('a', 'range', 'length')],
});
const FORMS = [form('yukawa', 'Yukawa'), form('gaussian', 'Gaussian')];

const base: Content = { title: 'Base', tags: [], document: DEFAULT_DOCUMENT };
const withDocument = (change: Partial<Content['document']>): Content => ({
  ...base,
  document: { ...DEFAULT_DOCUMENT, ...change },
});
const withTerm = (change: Record<string, string | { value: number; unit: string }>): Content =>
  withDocument({
    interaction: {
      terms: DEFAULT_DOCUMENT.interaction.terms.map((term) => ({ ...term, ...change })),
    },
  });

describe('differences in words and units', () => {
  test('a changed energy', () => {
    const after = withDocument({ energy: { value: 200, unit: 'eV' } });
    expect(differences(base, after, FORMS)).toEqual([
      { key: '/energy', label: 'Energy', before: '100 eV', after: '200 eV' },
    ]);
  });

  test('tables with as many rows and the same ends are told apart, and corrections are named', () => {
    const points = (V: number): [number, number][] => [
      [0, 1],
      [1, V],
      [2, 3],
    ];
    const table = (V: number) =>
      withDocument({ interaction: { terms: [{ form: 'tabulated', points: points(V) }] } });
    const [difference] = differences(table(1), table(2), FORMS);
    expect(difference?.before).toMatch(/^3 points, r 0 to 2, mark \w{6}$/);
    expect(difference?.after).not.toBe(difference?.before);
    expect(differences(base, withDocument({ corrections: ['mckinleyFeshbach'] }), FORMS)).toEqual([
      { key: '/corrections', label: 'Corrections', before: 'none', after: 'McKinley and Feshbach' },
    ]);
  });

  test('nothing where only the order of members or a default differs', () => {
    const { kinematics: _left, ...document } = DEFAULT_DOCUMENT;
    expect(_left).toBe('nonrelativistic');
    const reordered = Object.fromEntries(Object.entries(document).reverse());
    expect(same(reordered, document)).toBe(true);
    expect(differences(base, { ...base, document }, FORMS)).toEqual([]);
  });

  test('one parameter where the forms agree, the whole interaction where they do not', () => {
    const deeper = withTerm({ V0: { value: -20, unit: 'eV' } });
    expect(differences(base, deeper, FORMS)).toEqual([
      {
        key: '/interaction/terms/0/V0',
        label: 'Yukawa: strength',
        before: '−10 eV',
        after: '−20 eV',
      },
    ]);
    const other = withTerm({ form: 'gaussian' });
    expect(differences(base, other, FORMS)).toEqual([
      {
        key: '/interaction',
        label: 'Interaction',
        before: 'Yukawa, V0 = −10 eV, a = 1 Å',
        after: 'Gaussian, V0 = −10 eV, a = 1 Å',
      },
    ]);
  });

  test('every digit counts', () => {
    const after = withDocument({ energy: { value: 100.00000000000001, unit: 'eV' } });
    expect(differences(base, after, FORMS)[0]?.after).toBe('100.00000000000001 eV');
  });
});

describe('two people on one version', () => {
  const mine = withDocument({ energy: { value: 200, unit: 'eV' }, frame: 'lab' });
  const theirs = {
    ...withDocument({ energy: { value: 300, unit: 'eV' }, kinematics: 'relativistic' as const }),
    title: 'Theirs',
  };

  test('it is told who changed what', () => {
    const { disputes } = compareWork(base, mine, theirs, FORMS);
    expect(disputes.map(({ key, changedBy }) => [key, changedBy])).toEqual([
      ['title', 'theirs'],
      ['/energy', 'both'],
      ['/kinematics', 'theirs'],
      ['/frame', 'mine'],
    ]);
  });

  test('the merge holds every decision and nothing else', () => {
    const { fields } = compareWork(base, mine, theirs, FORMS);
    const merged = mergeWork(mine, theirs, fields, {
      title: 'theirs',
      '/energy': 'mine',
      '/kinematics': 'theirs',
      '/frame': 'mine',
    });
    expect(merged.title).toBe('Theirs');
    expect(merged.document).toEqual({
      ...DEFAULT_DOCUMENT,
      energy: { value: 200, unit: 'eV' },
      kinematics: 'relativistic',
      frame: 'lab',
    });
  });

  test('all mine is mine, all theirs is theirs', () => {
    const { fields } = compareWork(base, mine, theirs, FORMS);
    expect(mergeWork(mine, theirs, fields, {})).toEqual(mine);
    const all = Object.fromEntries(fields.map(({ key }) => [key, 'theirs' as const]));
    expect(same(mergeWork(mine, theirs, fields, all), theirs)).toBe(true);
  });

  test('a parameter is taken with the text that was typed for it', () => {
    const pointer = '/interaction/terms/0/V0';
    const other = withTerm({ V0: { value: -20, unit: 'eV' } });
    const typed = {
      ...other,
      document: { ...other.document, entered: { [pointer]: '-2e1 eV', '/energy': '1e2 eV' } },
    };
    const { fields } = compareWork(base, base, typed, FORMS);
    const merged = mergeWork(base, typed, fields, { [pointer]: 'theirs' });
    expect(merged.document.entered).toEqual({ [pointer]: '-2e1 eV' });
    expect(merged.document.interaction).toEqual(other.document.interaction);
  });

  test('a member one side left out is left out when that side wins', () => {
    const without = withDocument({});
    delete without.document.goldenRule;
    const { fields } = compareWork(base, base, without, FORMS);
    const merged = mergeWork(base, without, fields, { '/goldenRule': 'theirs' });
    expect('goldenRule' in merged.document).toBe(false);
  });
});
