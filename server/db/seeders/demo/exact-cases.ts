import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { DemoCase } from './scenario.ts';

const NUCLEAR = { length: 'fm', area: 'barn', energy: 'MeV' };
const fm = (value: number) => ({ value, unit: 'fm' });
const MeV = (value: number) => ({ value, unit: 'MeV' });

const alphaOnHelium: CaseDocument = {
  projectile: { species: 'alpha' },
  target: { kind: 'species', species: 'alpha' },
  energy: MeV(2),
  interaction: { terms: [{ form: 'coulomb' }] },
  methods: ['born1', 'partialWaves'],
  angles: { unit: 'deg', from: 15, to: 165, count: 301 },
  goldenRule: { theta: 90, boxSide: { value: 1, unit: 'pm' } },
  units: NUCLEAR,
};

const hardSphere: CaseDocument = {
  projectile: { species: 'neutron' },
  target: { kind: 'fixed', charge: 0 },
  energy: MeV(14),
  kinematics: 'relativistic',
  interaction: { terms: [{ form: 'hardSphere', R: fm(5) }] },
  methods: ['partialWaves'],
  units: NUCLEAR,
};

function well(depth: number): CaseDocument {
  return {
    projectile: { species: 'neutron' },
    target: { kind: 'fixed', charge: 0 },
    energy: { value: 1, unit: 'eV' },
    interaction: { terms: [{ form: 'squareWell', V0: MeV(depth), R: fm(2) }] },
    methods: ['born1', 'born2', 'partialWaves'],
    angles: { unit: 'deg', from: 0, to: 180, count: 37 },
    units: NUCLEAR,
  };
}

function absorbing(absorption: number): CaseDocument {
  return {
    projectile: { species: 'neutron' },
    target: { kind: 'nuclide', nuclide: 'Pb-208' },
    energy: MeV(100),
    kinematics: 'relativistic',
    interaction: {
      terms: [{ form: 'woodsSaxon', V0: MeV(-25), W0: MeV(absorption), R: fm(7), a: fm(0.65) }],
    },
    methods: ['born1', 'eikonal', 'partialWaves'],
    angles: { unit: 'deg', from: 0, to: 60, count: 241 },
    units: { length: 'fm', area: 'millibarn', energy: 'MeV' },
  };
}

const polarised: CaseDocument = {
  projectile: { species: 'proton' },
  target: { kind: 'nuclide', nuclide: 'Ca-40' },
  energy: MeV(20),
  kinematics: 'relativistic',
  interaction: {
    terms: [
      { form: 'extendedCharge', kind: 'uniformSphere', radius: fm(4.3) },
      { form: 'woodsSaxon', V0: MeV(-48), W0: MeV(-7), R: fm(4.2), a: fm(0.68) },
      { form: 'spinOrbit', Vso: MeV(6), Wso: MeV(0), R: fm(3.8), a: fm(0.6) },
    ],
  },
  methods: ['partialWaves'],
  angles: { unit: 'deg', from: 10, to: 170, count: 321 },
  units: { length: 'fm', area: 'millibarn', energy: 'MeV' },
};

/** Cases that rest on the exact curve. */
export const EXACT_CASES: readonly DemoCase[] = [
  {
    title: 'Alphas on helium: an interference first order has wrong',
    tags: ['alphas', 'helium', 'identical particles', 'exact'],
    campaign: 'theory',
    versions: [
      {
        author: 'theorist',
        note: 'Shows two identical bosons with the Coulomb phase, which first order lacks: at 60 degrees the exact curve is 0.4920 barn/sr where first order says 0.5898; at 90 degrees both agree on 0.3318.',
        document: alphaOnHelium,
      },
    ],
  },
  {
    title: 'Fast neutrons on a hard sphere: the shadow',
    tags: ['neutrons', 'hard sphere', 'exact'],
    campaign: 'theory',
    versions: [
      {
        author: 'theorist',
        note: 'Shows what no first order can give: an impenetrable sphere scatters 2.67 times its disc, a good part of it the shadow in the forward direction.',
        document: hardSphere,
      },
    ],
  },
  {
    title: 'Slow neutrons on a well near its first bound state',
    tags: ['neutrons', 'resonance', 'scattering length'],
    campaign: 'theory',
    versions: [
      {
        author: 'theorist',
        note: 'Shows where slow particles leave first order: at 7 MeV depth, far from binding, the exact cross section is already 4.8 times the first-order one.',
        document: well(-7),
      },
      {
        author: 'theorist',
        note: 'At 12.5 MeV the well is about to bind: the scattering length is -71.9 fm, 36 times its radius, a resonance at zero energy that no order of Born sees.',
        document: well(-12.5),
      },
    ],
  },
  {
    title: '100 MeV neutrons on lead: straight paths with absorption',
    tags: ['neutrons', 'lead', 'eikonal', 'absorption'],
    campaign: 'theory',
    versions: [
      {
        author: 'theorist',
        note: 'Shows straight paths doing well where first order does not: its elastic cross section is 6.7 times too large, that of the eikonal 5 per cent too small. Depths are assumed, not fitted.',
        document: absorbing(-12),
      },
    ],
  },
  {
    title: 'Protons polarised by Ca-40',
    tags: ['protons', 'calcium', 'spin-orbit', 'analysing power'],
    campaign: 'theory',
    versions: [
      {
        author: 'theorist',
        note: 'Shows a charge, a nuclear well with absorption and a spin-orbit term together: the analysing power of 20 MeV protons comes near 1 at 38.5 degrees in the centre of mass. Depths are assumed, not fitted.',
        document: polarised,
      },
    ],
  },
];
