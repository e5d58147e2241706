import { describe, expect, test } from 'vitest';
import {
  ELECTRON_MASS,
  FINE_STRUCTURE,
  MUON_MASS,
  PROTON_MASS,
} from '#server/physics/constants/codata2022.ts';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import { leptonSpin, leptonSpinWithMass } from '#server/physics/methods/lepton-spin.ts';
import { mckinleyFeshbachFactor, spinFactor } from '#server/physics/methods/spin-factor.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { Q, answer } from '../observables/bodies.ts';

const MEV = 1e6;
const ANGLES = [0.01, 0.5, Math.PI / 2, 2.5, Math.PI];

function factors(mass: number, targetMass: number, energy: number) {
  const collision = twoBody({
    projectileMass: mass,
    targetMass,
    energy,
    regime: 'relativistic',
  });
  return {
    kept: leptonSpinWithMass(mass, targetMass, collision),
    mott: leptonSpin({ mass, targetMass, energy, collision, correctedFor: null }),
  };
}

describe('the spin of a lepton with its mass kept in the recoil', () => {
  test('a slow muon on a proton follows Rutherford, though the target is no more than nine times heavier', () => {
    const { kept } = factors(MUON_MASS, PROTON_MASS, 1e-3);
    for (const theta of ANGLES) expectRelative(kept(theta), 1, 1e-9);
  });

  test('on a target that is heavy beyond measure it is 1 - beta² sin²(theta/2)', () => {
    const { kept } = factors(MUON_MASS, 1e12 * PROTON_MASS, 50 * MEV);
    for (const theta of ANGLES) {
      expectRelative(kept(theta), spinFactor(1 + (50 * MEV) / MUON_MASS, theta).value, 1e-11);
    }
  });

  test('for an electron of 1 GeV it is the formula with E′/E, but where spin forbids going back', () => {
    const { kept, mott } = factors(ELECTRON_MASS, PROTON_MASS, 1000 * MEV);
    for (const theta of [0.01, 0.5, 1.5]) expectRelative(kept(theta), mott(theta).value, 1e-8);
  });

  test('forwards both are the square of the invariant flux, E M/(E1 E2)', () => {
    const { kept, mott } = factors(MUON_MASS, PROTON_MASS, 129 * MEV);
    expectRelative(kept(1e-6), mott(1e-6).value, 1e-9);
  });
});

test('straight back nothing but 1/gamma² is left of the spin, however fast the centre of mass', () => {
  const [mass, targetMass, energy] = [ELECTRON_MASS, PROTON_MASS, 1e17];
  const collision = twoBody({ projectileMass: mass, targetMass, energy, regime: 'relativistic' });
  const { value } = leptonSpin({ mass, targetMass, energy, collision, correctedFor: null })(
    Math.PI,
  );
  // The formula at L = theta = pi: (E/mu)² (k/k_lab)⁴ (E'/E)/(J gamma²), every factor from the invariants.
  const { momentumCm: p, momentumLab: pLab, reducedMass, frame } = collision;
  const total = energy + mass;
  const kept = (total - (2 * p * p) / targetMass) / total;
  const jacobian = (frame.gamma * frame.rhoMinusOne) ** 2;
  const point = (total / reducedMass) ** 2 * (p / pLab) ** 4;
  expectRelative(value, (point * kept) / jacobian / (total / mass) ** 2, 1e-6);
});

describe('the caution about it', () => {
  const caution = (species: string, nuclide: string, energy: number) =>
    answer({
      projectile: { species },
      target: { kind: 'nuclide', nuclide },
      energy: Q(energy, 'MeV'),
      kinematics: 'relativistic',
      interaction: { terms: [{ form: 'coulomb' }] },
      methods: ['born1'],
      angles: { values: [90] },
    }).warnings.find(({ code }) => code === 'leptonMassInRecoil');

  test('muons of 210 MeV/c on protons: 1.3 % at 90 degrees, 21 % at 150 (recomputed outside this project)', () => {
    const { message } = caution('muon-', 'H-1', 129) ?? {};
    expect(message).toMatch(/1\.3 % larger at 90 degrees and 21 % larger at 150 degrees/);
  });

  test('none for electrons, none for muons on lead', () => {
    expect(caution('electron', 'H-1', 1)).toBeUndefined();
    expect(caution('electron', 'Ca-40', 250)).toBeUndefined();
    expect(caution('muon+', 'Pb-208', 30)).toBeUndefined();
  });
});

test('the correction of a slow lepton grows with its speed, not with what rounding leaves of gamma', () => {
  const mass = ELECTRON_MASS;
  for (const energy of [1e-9, 1e-5, 0.3, 20]) {
    const gamma = 1 + energy / mass;
    const corrected = mckinleyFeshbachFactor(gamma, 1, -1e6, energy / mass).value;
    const speed = Math.sqrt((2 * energy) / mass);
    const sine = Math.sin(0.5);
    // beta is sqrt(2T/m) but for 3T/4m of itself.
    const second = Math.PI * FINE_STRUCTURE * 1e6 * speed * sine * (1 - sine);
    expectRelative(
      corrected - spinFactor(gamma, 1).value,
      second,
      (2 * energy) / mass + 1e-11 + 1e-15 / second,
    );
  }
});
