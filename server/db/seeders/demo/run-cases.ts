import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { DemoCase } from './scenario.ts';

const Q = (value: number, unit: string) => ({ value, unit });

const alphasOnGold: CaseDocument = {
  projectile: { species: 'alpha' },
  target: { kind: 'nuclide', nuclide: 'Au-197' },
  energy: Q(4, 'MeV'),
  interaction: { terms: [{ form: 'coulomb' }] },
  methods: ['born1', 'partialWaves'],
  angles: { unit: 'deg', from: 15, to: 165, count: 151 },
  frame: 'lab',
  goldenRule: { theta: 60, boxSide: Q(1, 'pm') },
  units: { length: 'fm', area: 'barn', energy: 'MeV' },
  runPlan: {
    method: 'partialWaves',
    beam: { current: Q(2, 'nA'), chargeState: 2, dutyFactor: 1, energySpread: Q(5, 'keV') },
    foil: {
      formula: 'Au',
      density: Q(19.3, 'g/cm3'),
      thickness: Q(100, 'nm'),
      tilt: 0,
      scatterer: 'Au',
    },
    detectors: [30, 60, 100, 140].map((angle, i) => ({
      name: `D${i + 1}`,
      angle,
      distance: Q(120, 'mm'),
      apertureRadius: Q(4, 'mm'),
      efficiency: 0.98,
      deadTime: Q(2, 'us'),
      deadTimeModel: 'nonParalysable' as const,
      backgroundRate: Q(0.02, '1/s'),
    })),
    aim: { relativePrecision: 0.01, beamTime: Q(8, 'h') },
    uncertainties: { current: 0.02, thickness: 0.05, solidAngle: 0.01, angle: 0.2 },
  },
};

/** Cases with a run planned around them. */
export const RUN_CASES: readonly DemoCase[] = [
  {
    title: 'A shift of alphas on a gold foil, four positions',
    tags: ['alphas', 'gold', 'run plan'],
    campaign: 'gold',
    versions: [
      {
        author: 'experimentalist',
        note: 'Shows a run sized from its cross section: 1 per cent of the counts takes 1.8 s at 30 degrees and 324 s at 140, where 32.4 of them come in a second. The foil, known to 5 per cent, decides what the run is worth, not its length. Foil and openings are assumed.',
        document: alphasOnGold,
      },
    ],
  },
];
