import { describe, expect, test } from 'vitest';
import { questionsOf } from '#server/reports/cautions.ts';
import { MOST_DECADES, decadeScale, linearScale } from '#server/reports/scales.ts';
import { MISSING, writable } from '#server/reports/typeface.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';
import { coulombDocument, runPlanOf, savedVersion } from './saved-versions.ts';

const Q = (value: number, unit: string) => ({ value, unit });

describe('axes', () => {
  test('a linear axis has round ticks within its ends', () => {
    expect(linearScale(0, 180).ticks).toEqual([0, 30, 60, 90, 120, 150, 180]);
    expect(linearScale(30, 150, 6).ticks).toEqual([40, 60, 80, 100, 120, 140]);
  });

  test('a single angle still has room around it', () => {
    const { from, to } = linearScale(90, 90);
    expect(from).toBeLessThan(90);
    expect(to).toBeGreaterThan(90);
  });

  test('a logarithmic axis ends at whole decades and holds every value', () => {
    expect(decadeScale([0.02, 3, 0])).toMatchObject({ from: -2, to: 1, ticks: [-2, -1, 0, 1] });
    expect(decadeScale([1])).toMatchObject({ from: 0, to: 1 });
  });

  test('what is too deep to be seen beside the peak does not stretch the axis', () => {
    const scale = decadeScale([1e-300, 5]);
    expect(scale).toMatchObject({ from: 1 - MOST_DECADES, to: 1 });
    expect(scale?.ticks.length).toBeLessThanOrEqual(9);
  });

  test('without a value above zero there is no axis', () => {
    expect(decadeScale([])).toBeNull();
    expect(decadeScale([0, -1])).toBeNull();
  });
});

test('a text is written with what the typeface holds, controls left out', () => {
  const glyphs = { hasGlyphForCodePoint: (code: number) => code < 0x250 };
  expect(writable('a\u202Eb\u0000c\r\nd\te', glyphs)).toBe('abc\nd e');
  expect(writable('Eₕ 😀 e\u0301', glyphs)).toBe(`Eh ${MISSING} é`);
});

describe('the questions before a run', () => {
  const asked = (document: CaseDocument) =>
    questionsOf({ kind: 'full', caseNumber: 1, version: savedVersion(document) }).join(' ');

  test('electrons make X-rays where they stop, and nothing active at 100 eV', () => {
    const text = asked({ ...yukawaDocument, runPlan: runPlanOf(1) });
    expect(text).toContain('X-rays');
    expect(text).toContain('vacuum');
    expect(text).not.toContain('become active');
  });

  test('ions ask for activation, neutrons for where they go and for no high voltage', () => {
    expect(asked(coulombDocument)).toContain('become active');
    const neutrons = asked({ ...yukawaDocument, projectile: { species: 'neutron' } });
    expect(neutrons).toContain('gamma rays');
    expect(neutrons).not.toContain('high voltage');
  });

  test('lead is toxic, cold hydrogen is flammable and a cryogen stands behind it', () => {
    const { foil, ...run } = runPlanOf(1);
    const lead = { ...run, foil: { ...foil, formula: 'Pb', scatterer: 'Pb' } };
    expect(asked({ ...yukawaDocument, runPlan: lead })).toContain('Pb is toxic');
    const gas = {
      formula: 'H2',
      pressure: Q(100, 'Pa'),
      temperature: Q(20, 'K'),
      length: Q(10, 'mm'),
      scatterer: 'H',
    };
    const cold = asked({ ...yukawaDocument, runPlan: { ...run, gas } });
    expect(cold).toContain('flammable');
    expect(cold).toContain('cryogen');
    expect(cold).toContain('pressure of the gas');
  });

  test('no question carries a figure', () => {
    expect(asked({ ...coulombDocument, runPlan: runPlanOf(1) })).not.toMatch(/\d/);
  });
});
