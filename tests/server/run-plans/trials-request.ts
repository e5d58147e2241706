import { yukawaDocument } from '../documents/sample-documents.ts';

/** A Monte Carlo run of a thin target with two detectors. */
export const trialsRequest = {
  plan: {
    estimate: yukawaDocument,
    beam: { particlesPerSecond: 1e6 },
    foil: { arealDensity: { value: 1e13, unit: '1/cm2' } },
    detectors: [
      { name: 'D1', angle: 30, solidAngle: 0.01 },
      { name: 'D2', angle: 60, solidAngle: 0.01 },
    ],
    uncertainties: { current: 0.02, thickness: 0.05, energy: 0.01 },
  },
  detector: 'D2',
  trials: 120_000,
  seed: 11,
};
