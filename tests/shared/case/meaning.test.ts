import katex from 'katex';
import { describe, expect, test } from 'vitest';
import { caseDocumentSchema } from '#shared/contracts/cases.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';
import { presentForm } from '#server/modules/forms/present-forms.ts';
import { electronScatteringFactor } from '#server/physics/tables/electron-scattering.ts';
import { FORMS } from '#server/physics/potentials/register.ts';
import { latexOf } from '#src/features/case/aids/model/latex.ts';
import type { Meaning } from '#src/features/case/aids/model/meaning-amplitude.ts';
import { FIGURES, meaningOfFigure } from '#src/features/case/aids/model/meaning-figure.ts';
import { meaningOfPoint } from '#src/features/case/aids/model/meaning-point.ts';
import { rightHandSide, substituted } from '#src/features/case/aids/model/substitute.ts';

const Q = (value: number, unit: string) => ({ value, unit });
const forms = FORMS.map(presentForm);
const document = (change: object): CaseDocument =>
  caseDocumentSchema.parse({
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 0 },
    energy: Q(100, 'eV'),
    interaction: { terms: [{ form: 'yukawa', V0: Q(-10, 'eV'), a: Q(1, 'angstrom') }] },
    methods: ['born1'],
    angles: { values: [0, 60, 120] },
    ...change,
  });

function differentialOf(estimate: Estimate) {
  const born = estimate.methods.born1;
  if (!born || 'unavailable' in born) throw new Error('no curve');
  return born.differential;
}

function pointOf(from: CaseDocument, place: number): Meaning {
  const asked = { ...from, aids: { kinematics: true } };
  const estimate = computeEstimate(asked);
  const point = differentialOf(estimate)[place];
  if (!point) throw new Error('no point');
  const way = estimate.aids?.kinematics?.rows[place]?.ways[0] ?? null;
  return meaningOfPoint({ estimate, document: from, forms, point, way, exchanged: null });
}

/** Every formula can be typeset: a slip of TeX throws. */
function expectTypesets(meaning: Meaning): void {
  for (const { law, substituted: numbers } of meaning.steps) {
    for (const tex of [law, numbers].filter((text) => text !== '')) {
      katex.renderToString(tex, { throwOnError: true, strict: 'ignore' });
      expect(tex).not.toMatch(/NaN|undefined|null/);
    }
  }
}

describe('values in place of symbols', () => {
  const put = (tex: string, values: Record<string, string>) =>
    substituted(tex, new Map(Object.entries(values)));
  test('keep powers, products and words', () => {
    expect(put('\\frac{V_0\\,a^3}{1+q^2a^2}', { V_0: '-1', a: '2', q: '3' })).toBe(
      '\\frac{\\left(-1\\right)\\,\\left(2\\right)^3}{1+\\left(3\\right)^2\\left(2\\right)^2}',
    );
  });
  test('never touch commands, subscripts of others, or text', () => {
    expect(put('\\alpha a_0 \\text{a a} \\mathrm{Im} a_{0}', { a: '2' })).toBe(
      '\\alpha a_0 \\text{a a} \\mathrm{Im} a_{0}',
    );
  });
  test('take a symbol of two factors as one', () => {
    expect(put('\\frac{Z_1 Z_2\\,\\alpha}{q^2}', { 'Z_1 Z_2': '158' })).toBe(
      '\\frac{\\left(158\\right)\\,\\alpha}{q^2}',
    );
  });
  test('of a law its right-hand side is taken', () => {
    expect(rightHandSide('\\int r = \\frac{a}{b}')).toBe('\\frac{a}{b}');
    expect(rightHandSide('none')).toBe('none');
  });
});

describe('what a figure is', () => {
  test.each(FIGURES)('%s, of an absorbing well', (kind) => {
    const from = document({
      projectile: { species: 'neutron' },
      energy: Q(14, 'MeV'),
      interaction: {
        terms: [{ form: 'squareWell', V0: Q(-40, 'MeV'), W0: Q(-5, 'MeV'), R: Q(4, 'fm') }],
      },
      units: { length: 'fm', area: 'barn', energy: 'MeV' },
    });
    const meaning = meaningOfFigure(kind, {
      estimate: computeEstimate(from),
      document: from,
      forms,
    });
    if (!meaning) throw new Error('no meaning');
    expectTypesets(meaning);
    expect(meaning.facts.map(({ name }) => name)).toEqual([
      'Unit',
      'Frame',
      'Approximation',
      'Numerical error',
      'Limits of it',
      'Source',
    ]);
    expect(meaning.facts[0]?.text).toContain('b per target particle');
  });

  test('of electrons on atoms says what tables of bare Gaussians lack, as the engine has it', () => {
    const at100keV = { kinematics: 'relativistic', energy: Q(100, 'keV') };
    const figuresOf = (terms: object[]) => {
      const from = document({ ...at100keV, interaction: { terms } });
      const born = computeEstimate(from).methods.born1;
      if (!born || 'unavailable' in born) throw new Error('no figures');
      const { elastic, momentumTransfer } = born;
      if ('divergent' in elastic || 'divergent' in momentumTransfer) throw new Error('divergent');
      return [elastic.value, momentumTransfer.value] as const;
    };
    const added = ['C', 'Al', 'Cu', 'Au'].map((element) => {
      const { a, b } = electronScatteringFactor(element);
      const bells = a.map((height, i) => {
        const width = Math.sqrt(b[i] ?? NaN) / (2 * Math.PI);
        const depth = (-3.80998212 * 4 * height) / (Math.sqrt(Math.PI) * width ** 3);
        return { form: 'gaussian', V0: Q(depth, 'eV'), a: Q(width, 'angstrom') };
      });
      const [whole, bare] = [figuresOf([{ form: 'atomicElectron', element }]), figuresOf(bells)];
      return [100 * (whole[0] / bare[0] - 1), whole[1] / bare[1]] as const;
    });
    expect(added.map(([share]) => share.toFixed(1))).toEqual(['0.8', '1.3', '2.4', '3.2']);
    expect(added.map(([, times]) => times.toFixed(1))).toEqual(['2.3', '2.6', '2.8', '3.1']);

    const terms = [{ form: 'atomicElectron', element: 'C' }];
    const from = document({ ...at100keV, interaction: { terms } });
    const given = { estimate: computeEstimate(from), document: from, forms };
    const said = (kind: 'elastic' | 'momentumTransfer' | 'absorption') =>
      meaningOfFigure(kind, given)?.facts.find(({ name }) => name === 'Against tables')?.text;
    expect(said('elastic')).toContain('0.8 % for C, 1.3 % for Al, 2.4 % for Cu and 3.2 % for Au');
    expect(said('momentumTransfer')).toContain('doubles to triples');
    expect(said('absorption')).toBeUndefined();
  });

  test('that diverges says why in place of an error', () => {
    const from = document({ interaction: { terms: [{ form: 'coulomb', chargeProduct: -1 }] } });
    const meaning = meaningOfFigure('elastic', {
      estimate: computeEstimate(from),
      document: from,
      forms,
    });
    expect(meaning?.steps[0]?.substituted).toContain('\\infty');
    expect(meaning?.facts[3]?.text).toContain('1/r');
  });
});

describe('what a cross section at an angle is', () => {
  test('the law, the values, and what they come to', () => {
    const meaning = pointOf(document({}), 1);
    expectTypesets(meaning);
    const transform = meaning.steps.find(({ name }) => name.startsWith('Transform'));
    // V0 a³/(1 + q²a²) with q = k at 60 degrees: -10/(1 + 26.2468).
    expect(transform?.substituted).toContain('\\left(-10\\,\\text{eV}\\right)');
    expect(transform?.substituted).toContain('-0.367015');
    expect(meaning.steps.at(-1)?.substituted).toContain('0.0092794');
  });

  test('in the lab with the change of frame, whose product is the value', () => {
    const from = document({ target: { kind: 'species', species: 'positron' }, frame: 'lab' });
    const meaning = pointOf(from, 1);
    expectTypesets(meaning);
    expect(meaning.steps.at(-1)?.name).toBe('From the centre of mass to the lab');
    // Equal masses: 4 cos 60° = 2.
    expect(meaning.steps.at(-1)?.substituted).toContain('= 2,');
  });

  test('of identical particles with both amplitudes, of a lepton with its spin', () => {
    const electrons = document({ target: { kind: 'species', species: 'electron' } });
    expect(pointOf(electrons, 1).steps.at(-1)?.law).toContain('f(\\pi-\\theta)');
    const fast = document({
      energy: Q(1, 'MeV'),
      kinematics: 'relativistic',
      interaction: { terms: [{ form: 'coulomb', chargeProduct: -13 }] },
    });
    const spin = pointOf(fast, 1);
    expectTypesets(spin);
    expect(spin.steps.at(-1)?.name).toContain('spin');
  });

  test.each(forms.map(({ key }) => key))('every form is typeset: %s', (key) => {
    const form = forms.find((entry) => entry.key === key);
    const usable = (form?.parameters ?? []).filter(({ optional }) => optional !== true);
    const term = Object.fromEntries(usable.map((parameter) => [parameter.key, parameter.default]));
    const from = document({
      interaction: { terms: [{ form: 'yukawa', V0: Q(1, 'eV'), a: Q(1, 'nm') }] },
    });
    const shown = { ...from, interaction: { terms: [{ ...term, form: key }] } };
    const estimate = computeEstimate(from);
    const point = differentialOf(estimate)[1];
    if (!point) throw new Error('no point');
    expectTypesets(
      meaningOfPoint({ estimate, document: shown, forms, point, way: null, exchanged: null }),
    );
  });
});

test('LaTeX: comments, laws and numbers, one line each, nothing a compiler trips over', () => {
  const meaning = pointOf(document({}), 1);
  const text = latexOf(meaning);
  expect(text.split('\n').filter((line) => line.startsWith('%')).length).toBeGreaterThan(4);
  expect(text).toMatch(/\\begin\{align\*\}\n( {2}& .+\\\\\n)+ {2}& .+\n\\end\{align\*\}/);
  expect(text.split('\\begin')[1]).not.toMatch(/[Å°]/);
});
