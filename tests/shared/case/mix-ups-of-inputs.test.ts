import { describe, expect, test } from 'vitest';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import { computedSlip, judgeMixUp, usualSlips } from '#shared/mix-ups.ts';
import type { ComparedKind } from '#shared/mix-ups.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';
import { alternativesOf, atAngle, readValue } from '#src/features/case/aids/model/alternatives.ts';

const Q = (value: number, unit: string) => ({ value, unit });
const ALPHA: CaseDocument = {
  projectile: { species: 'alpha' },
  target: { kind: 'nuclide', nuclide: 'C-12' },
  energy: Q(2, 'MeV'),
  interaction: { terms: [{ form: 'screenedCoulomb', a: Q(0.1, 'angstrom') }] },
  methods: ['born1'],
  frame: 'lab',
  units: { length: 'fm', area: 'barn', energy: 'MeV' },
};

function valueOf(body: EstimateRequest, kind: ComparedKind = 'dcs'): number {
  const value = readValue(computeEstimate(body), kind);
  if (value === null) throw new Error('no value');
  return value;
}

/** What the check says when another source gives `theirs` (angstrom²) in barn. */
function explained(
  document: CaseDocument,
  theta: number,
  theirs: number,
  kind: ComparedKind = 'dcs',
): string[] {
  const plain = atAngle(document, theta, 'deg');
  const ours = valueOf(plain, kind);
  const estimate = computeEstimate(plain);
  const slips = alternativesOf({ document, estimate, kind, theta }).flatMap((slip) => {
    const value = readValue(computeEstimate(slip.body), slip.read);
    return value === null ? [] : [computedSlip(slip.key, slip.words, value, ours)];
  });
  const usual = usualSlips(kind, 'barn', (theta * Math.PI) / 180);
  const judged = judgeMixUp(theirs, ours, [...usual, ...slips.filter((slip) => slip !== null)]);
  return judged.verdict === 'explained' ? judged.by.map(({ key }) => key) : [judged.verdict];
}

describe('slips with the inputs are found by asking the engine', () => {
  const plain = atAngle(ALPHA, 60, 'deg');
  test.each([
    ['frame', valueOf({ ...plain, frame: 'cm' })],
    ['energy as cm', valueOf({ ...plain, energy: Q(2 * (1 + 4.0015 / 11.9967), 'MeV') })],
    ['energy of cm', valueOf({ ...plain, energy: Q(2 / (1 + 4.0015 / 11.9967), 'MeV') })],
    ['per nucleon', valueOf({ ...plain, energy: Q(8, 'MeV') })],
    ['total', valueOf({ ...plain, energy: Q(0.5, 'MeV') })],
    ['half angle', valueOf(atAngle(ALPHA, 30, 'deg'))],
    ['double angle', valueOf(atAngle(ALPHA, 120, 'deg'))],
    // 60 rad is 9 whole turns and 197.75 degrees, which is 162.25 from ahead.
    ['radians', valueOf(atAngle(ALPHA, 162.2532, 'deg'))],
    ['is total', valueOf(plain, 'total')],
  ])('%s', (key, theirs) => {
    expect(explained(ALPHA, 60, theirs)).toContain(key);
  });

  test('protons on protons at 30 degrees: 4 cos θ between lab and centre of mass', () => {
    const protons: CaseDocument = {
      ...ALPHA,
      projectile: { species: 'proton' },
      target: { kind: 'species', species: 'proton' },
      interaction: { terms: [{ form: 'contact', b: Q(1, 'fm') }] },
    };
    const ours = valueOf(atAngle(protons, 30, 'deg'));
    expect(explained(protons, 30, ours / (4 * Math.cos(Math.PI / 6)))).toContain('frame');
  });

  test('momentum transfer and s = q/4π', () => {
    const electrons: CaseDocument = {
      projectile: { species: 'electron' },
      target: { kind: 'fixed', charge: 0 },
      energy: Q(100, 'keV'),
      kinematics: 'relativistic',
      interaction: { terms: [{ form: 'yukawa', V0: Q(-10, 'eV'), a: Q(1, 'angstrom') }] },
      methods: ['born1'],
    };
    const theta = 4;
    const sine = Math.sin((theta * Math.PI) / 360) * 4 * Math.PI;
    const theirs = valueOf(atAngle(electrons, (360 / Math.PI) * Math.asin(sine), 'deg'));
    expect(explained(electrons, theta, theirs)).toContain('s for q');
    expect(
      explained(
        electrons,
        theta,
        valueOf({ ...atAngle(electrons, theta, 'deg'), kinematics: 'nonrelativistic' }),
      ),
    ).toContain('regime');
  });

  test('a value that fits nothing stays unexplained', () => {
    expect(explained(ALPHA, 60, 1.37 * valueOf(plain))).toEqual(['unexplained']);
  });

  test('totals are compared by energy and recoil, never by angle', () => {
    const estimate = computeEstimate(plain);
    const keys = alternativesOf({ document: ALPHA, estimate, kind: 'total', theta: 60 }).map(
      ({ key, read }) => [key, read],
    );
    expect(keys).toContainEqual(['energy as cm', 'total']);
    expect(keys.every(([, read]) => read === 'total')).toBe(true);
  });
});
