import type { CaseDocument, VersionDetail } from '#shared/contracts/cases.ts';
import { canonicalHash } from '#server/documents/canonical-hash.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';
import { computeRunPlan } from '#server/modules/run-plans/compute-run-plan.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';

type RunPlanSent = NonNullable<CaseDocument['runPlan']>;

const Q = (value: number, unit: string) => ({ value, unit });

/** Gold and helium, where first order diverges in the forward direction and nothing is exact but the formula. */
export const coulombDocument = {
  projectile: { species: 'alpha' },
  target: { kind: 'nuclide', nuclide: 'Au-197' },
  energy: Q(5, 'MeV'),
  interaction: { terms: [{ form: 'coulomb', chargeProduct: 158 }] },
  methods: ['born1'],
  angles: { unit: 'deg', values: [30, 60, 90, 120, 150] },
  frame: 'lab',
} satisfies CaseDocument;

/** No first order: a wall of infinite height has no transform. */
export const hardSphereDocument = {
  ...yukawaDocument,
  interaction: { terms: [{ form: 'hardSphere', R: Q(1, 'angstrom') }] },
  methods: ['born1', 'partialWaves'],
} satisfies CaseDocument;

export function runPlanOf(detectors: number): RunPlanSent {
  return {
    method: 'born1',
    beam: { current: Q(10, 'nA'), chargeState: 1, energySpread: Q(0.5, 'eV') },
    foil: { formula: 'C', density: Q(2, 'g/cm3'), thickness: Q(1, 'nm'), scatterer: 'C' },
    detectors: Array.from({ length: detectors }, (_, index) => ({
      name: `Counter ${index + 1}`,
      angle: 20 + (140 * index) / detectors,
      solidAngle: 1e-4,
      efficiency: 0.9,
      deadTime: Q(1, 'us'),
      backgroundRate: Q(0.2, '1/s'),
    })),
    aim: { relativePrecision: 0.02, beamTime: Q(8, 'h') },
    uncertainties: { current: 0.02, thickness: 0.05, efficiency: 0.03 },
  };
}

/** A version as saving it would leave it, without a database. */
export function savedVersion(
  document: CaseDocument,
  changes: Partial<VersionDetail> = {},
): VersionDetail {
  const { runPlan: planned, ...body } = document;
  const estimate = computeEstimate(body);
  const runPlan = planned && computeRunPlan({ ...planned, estimate: body });
  const result = { estimate, ...(runPlan && { runPlan }) };
  const { engine } = estimate;
  return {
    n: 3,
    title: 'Yukawa well',
    document,
    result,
    engine,
    hash: canonicalHash({ document, result, engine }),
    author: { id: '00000000-0000-4000-8000-000000000001', name: 'Experimentalist of the hall' },
    createdAt: '2026-01-02T03:04:05.678Z',
    note: 'How much is scattered past 20 degrees?',
    status: 'draft',
    ...changes,
  };
}
