import { describe, expect, it } from 'vitest';
import { DEFAULT_SETTINGS } from '#shared/contracts/settings.ts';
import { changeOf, settingsDifferences, textsOf } from '#src/features/admin/model/thresholds.ts';

const texts = textsOf(DEFAULT_SETTINGS);

describe('the thresholds as they are typed', () => {
  it('come back as they are set', () => {
    const { body, faults } = changeOf(texts, ' ');
    expect(faults).toEqual({});
    expect(body).toEqual(DEFAULT_SETTINGS);
    expect(settingsDifferences(DEFAULT_SETTINGS, body)).toEqual([]);
  });

  it('may be per cent, and are then the same fraction', () => {
    const { body, faults } = changeOf(
      { ...texts, 'verdict/exact/sound': '3 %', 'verdict/exact/usable': '30%' },
      'why',
    );
    expect(faults).toEqual({});
    expect(body.verdict.exact).toEqual({ sound: 0.03, usable: 0.3 });
    expect(body.note).toBe('why');
    expect(settingsDifferences(DEFAULT_SETTINGS, body)).toEqual([
      { key: 'verdict/exact/sound', label: 'Sound, deviation', before: '0.02', after: '0.03' },
      { key: 'verdict/exact/usable', label: 'Usable, deviation', before: '0.2', after: '0.3' },
    ]);
  });

  it.each([
    ['verdict/exact/sound', '0'],
    ['verdict/exact/sound', 'little'],
    ['verdict/exact/sound', ''],
    ['verdict/exact/sound', '0.02 eV'],
    ['verdict/exact/usable', '0.02'],
    ['verdict/exact/usable', '11'],
    ['verdict/criteria/usable', '1e999'],
  ])('are refused at their place: %s as “%s”', (place, text) => {
    const { faults } = changeOf({ ...texts, [place]: text }, '');
    expect(Object.keys(faults)).toContain(place);
  });
});
