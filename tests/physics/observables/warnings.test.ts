import { expect, test } from 'vitest';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { CONTRACT_BODY, NUCLEAR_UNITS, Q, answer, born1, integral } from './bodies.ts';

const COULOMB = { terms: [{ form: 'coulomb' }] };
const warning = (body: object, code: string) =>
  answer({ ...CONTRACT_BODY, ...body }).warnings.find((entry) => entry.code === code);
const number = (text: string | undefined, pattern: RegExp) => Number(pattern.exec(text ?? '')?.[1]);

const alphas = (energy: number, nuclide = 'Au-197') => ({
  projectile: { species: 'alpha' },
  target: { kind: 'nuclide', nuclide },
  energy: Q(energy, 'MeV'),
  interaction: COULOMB,
  units: NUCLEAR_UNITS,
});

test('an ordinary case carries one line of information and nothing else', () => {
  expect(answer(CONTRACT_BODY).warnings.map(({ code, level }) => [code, level])).toEqual([
    ['elasticOnly', 'info'],
  ]);
});

test('nuclear forces: the head-on distance against the radii and three fermi', () => {
  expect(warning(alphas(5.486), 'nuclearForces')).toBeUndefined();
  const { message } = warning(alphas(25), 'nuclearForces') ?? {};
  // Z1 Z2 e²/E_cm with recoil of gold: 42.314 fm at 5.486 MeV (recomputed outside this project), as 1/E.
  expectRelative(number(message, /to ([\d.]+) fm/), (42.314 * 5.486) / 25, 5e-3);
  expectRelative(
    number(message, /forces \(([\d.]+) fm/),
    1.2 * (197 ** (1 / 3) + 4 ** (1 / 3)) + 3,
    5e-3,
  );

  const well = { form: 'gaussian', V0: Q(-100, 'MeV'), a: Q(2, 'fm') };
  const withForce = { ...alphas(25), interaction: { terms: [...COULOMB.terms, well] } };
  expect(warning(withForce, 'nuclearForces')).toBeUndefined();
});

test('the spin of relativistic leptons: applied where all terms are charges, else the factor that lacks', () => {
  const fast = {
    energy: Q(1, 'MeV'),
    kinematics: 'relativistic',
    target: { kind: 'fixed', charge: 13 },
  };
  expect(warning({ ...fast, interaction: COULOMB }, 'spinFactorApplied')?.level).toBe('info');
  expect(warning({ ...fast, interaction: COULOMB }, 'spinFactorMissing')).toBeUndefined();
  const [yukawa] = CONTRACT_BODY.interaction.terms;
  const mixed = { terms: [...COULOMB.terms, yukawa] };
  const found = warning({ ...fast, interaction: mixed }, 'spinFactorMissing');
  expect(found?.message).toMatch(/the yukawa term is not the potential of a charge/);
  // Mott factor at 90 degrees and 1 MeV: 0.557185, recomputed outside this project.
  expectRelative(number(found?.message, /([\d.]+) at 90 degrees/), 0.557185, 2e-6);
  expect(warning(fast, 'spinFactorMissing')).toBeUndefined();
});

test('nonrelativistic kinematics of a fast projectile: by how much it is wrong', () => {
  const found = warning({ energy: Q(100, 'keV') }, 'nonrelativisticKinematics');
  // Wavelengths 3.701437 and 3.878299 pm with and without relativity at 100 keV.
  expectRelative(
    number(found?.message, /wave number is ([\d.]+) %/),
    100 * (3.878299 / 3.701437 - 1),
    0.03,
  );
  expectRelative(number(found?.message, /moves at ([\d.]+) c/), 0.548221, 1e-3);
  expect(
    warning({ energy: Q(100, 'keV'), kinematics: 'relativistic' }, 'nonrelativisticKinematics'),
  ).toBeUndefined();
  expect(warning({}, 'nonrelativisticKinematics')).toBeUndefined();
});

test('screening left out, and where it matters', () => {
  const found = warning(alphas(5.486), 'screeningLeftOut');
  // Thomas-Fermi length of gold: 0.1091865 angstrom, recomputed outside this project.
  expectRelative(number(found?.message, /a about ([\d.]+) angstrom/), 0.1091865, 2e-3);
  expect(
    warning({ ...alphas(5.486), target: { kind: 'fixed', charge: 79 } }, 'screeningLeftOut'),
  ).toBeUndefined();
});

test('the phase that the interference of two charges lacks', () => {
  expect(warning(alphas(2, 'He-4'), 'coulombPhaseMissing')?.message).toMatch(/interference/);
  expect(
    warning({ ...alphas(2, 'He-4'), identical: false }, 'coulombPhaseMissing'),
  ).toBeUndefined();
  expect(warning(alphas(2, 'He-4'), 'identicalParticles')?.level).toBe('info');
});

test('a charge form without charge, a point nucleus at short waves, a free length', () => {
  expect(warning({ interaction: COULOMB }, 'noCharge')?.path).toBe('/interaction/terms');
  const electrons = {
    target: { kind: 'nuclide', nuclide: 'C-12' },
    kinematics: 'relativistic',
    interaction: COULOMB,
  };
  expect(warning({ ...electrons, energy: Q(100, 'MeV') }, 'pointNucleus')).toBeDefined();
  expect(warning({ ...electrons, energy: Q(1, 'MeV') }, 'pointNucleus')).toBeUndefined();
  const extended = { form: 'extendedCharge', kind: 'uniformSphere', radius: Q(3.19, 'fm') };
  const spread = { ...electrons, energy: Q(100, 'MeV'), interaction: { terms: [extended] } };
  expect(warning(spread, 'pointNucleus')).toBeUndefined();
  expect(warning(spread, 'coulombTotalDiverges')).toBeDefined();
  const neutron = {
    projectile: { species: 'neutron' },
    target: { kind: 'nuclide', nuclide: 'H-1' },
    interaction: { terms: [{ form: 'contact', b: Q(-3.739, 'fm') }] },
  };
  // Bound to free for hydrogen: half, all but the binding of the electron; the square is the 0.2498 of its cross section.
  const factor = number(warning(neutron, 'freeLength')?.message, /by ([\d.]+)\.$/);
  expectRelative(factor ** 2, 0.2497918, 1e-3);
});

test('a table: what another reading between its rows would change', () => {
  const table = (count: number) => ({
    interaction: {
      terms: [
        {
          form: 'tabulated',
          lengthUnit: 'angstrom',
          energyUnit: 'eV',
          points: Array.from({ length: count }, (_, i) => {
            const r = (4 * i) / (count - 1);
            return [r, -10 * Math.exp(-r * r)];
          }),
          tail: 'zero',
        },
      ],
    },
  });
  const percent = (count: number) => {
    const found = warning(table(count), 'tableResolution');
    return { level: found?.level, value: number(found?.message, /up to ([\d.e-]+) %/) };
  };
  const [coarse, fine] = [percent(9), percent(161)];
  expect(coarse.level).toBe('caution');
  expect(fine.level).toBe('info');
  // Straight lines miss h² V''/12 on average: twenty times finer steps are four hundred times better.
  expect(coarse.value / fine.value).toBeGreaterThan(200);
  expect(coarse.value / fine.value).toBeLessThan(800);
  expect(warning({}, 'tableResolution')).toBeUndefined();
});

test('Molière: a Z that is not the charge of the target is said', () => {
  const of = (Z: number) =>
    warning(
      { target: { kind: 'fixed', charge: 7 }, interaction: { terms: [{ form: 'moliere', Z }] } },
      'chargesDiffer',
    );
  expect(of(6)?.message).toMatch(/Z = 6, the target has charge 7/);
  expect(of(7)).toBeUndefined();
});

test('a length from the table is said with its edition, incoherent scattering with its size', () => {
  const neutron = (target: object) => ({
    projectile: { species: 'neutron' },
    target,
    energy: Q(25.3, 'meV'),
    interaction: { terms: [{ form: 'contact', nuclide: 'H-1' }] },
  });
  const free = neutron({ kind: 'nuclide', nuclide: 'H-1' });
  expect(warning(free, 'lengthFromTable')?.message).toMatch(
    /H-1 is -3\.7\d+ fm .*M\/\(m \+ M\) = 0\.499/,
  );
  expect(warning(free, 'freeLength')).toBeUndefined();
  const fixed = neutron({ kind: 'fixed', charge: 0 });
  // The bound incoherent cross section of hydrogen is 80.3 b (from memory); the free one a quarter of it.
  expectRelative(number(warning(fixed, 'incoherentAdded')?.message, /([\d.]+) barn/), 80.3, 5e-3);
  expectRelative(
    number(warning(free, 'incoherentAdded')?.message, /([\d.]+) barn/),
    80.3 / 4,
    6e-3,
  );
  expect(warning({}, 'incoherentAdded')).toBeUndefined();
});

test('what cannot be drawn is said', () => {
  const shell = { form: 'deltaShell', g: Q(1, 'eV angstrom'), R: Q(1, 'angstrom') };
  const [yukawa] = CONTRACT_BODY.interaction.terms;
  expect(
    warning({ interaction: { terms: [shell, yukawa] } }, 'potentialIncomplete')?.message,
  ).toMatch(/deltaShell/);
  expect(answer({ ...CONTRACT_BODY, interaction: { terms: [shell] } }).potential).toMatchObject({
    unavailable: true,
  });
});

test('equal masses: with relativity the wave number is the same, and that is what is said', () => {
  const protons = {
    projectile: { species: 'proton' },
    target: { kind: 'species', species: 'proton' },
    energy: Q(100, 'MeV'),
    interaction: COULOMB,
  };
  const { message } = warning(protons, 'nonrelativisticKinematics') ?? {};
  // mu grows by sqrt(1 + T/2m), so the point-charge cross section by 1 + T/2m.
  expect(message).toMatch(
    /the wave number is right and a point-charge cross section 5\.3 % too small/,
  );
});

test('without charges it is the forward cross section that is told', () => {
  const neutrons = {
    projectile: { species: 'neutron' },
    energy: Q(100, 'MeV'),
    interaction: { terms: [{ form: 'gaussian', V0: Q(-1, 'MeV'), a: Q(2, 'fm') }] },
  };
  const { message } = warning(neutrons, 'nonrelativisticKinematics') ?? {};
  // A fixed centre: E/m - 1 = 100/939.565, squared.
  expectRelative(
    number(message, /the forward cross section ([\d.]+) % too small/),
    100 * ((1 + 100 / 939.565) ** 2 - 1),
    0.02,
  );
});

test('screening beside a charge that is no point: electrons of the same mean square radius', () => {
  const fast = {
    projectile: { species: 'electron' },
    target: { kind: 'nuclide', nuclide: 'Au-197' },
    energy: Q(250, 'MeV'),
    kinematics: 'relativistic',
  };
  const term = { form: 'extendedCharge', kind: 'gaussian', radius: Q(5.4, 'fm') };
  const { message } =
    warning({ ...fast, interaction: { terms: [term] } }, 'screeningLeftOut') ?? {};
  expectRelative(number(message, /about ([\d.]+) angstrom\)/), Math.sqrt(6) * 0.1091865, 3e-3);

  // With them the whole is neutral, and nothing is left to say.
  const radius = Q(Math.sqrt(6) * 0.1091865, 'angstrom');
  const cloud = { form: 'extendedCharge', kind: 'dipole', radius, chargeProduct: 79 };
  const whole = { ...fast, interaction: { terms: [term, cloud] } };
  expect(warning(whole, 'screeningLeftOut')).toBeUndefined();
  expect(warning(whole, 'coulombTotalDiverges')).toBeUndefined();
});

test('atoms of a term that are not those of beam and target', () => {
  const pair = (Z1: number, Z2: number) => ({ terms: [{ form: 'universalIon', Z1, Z2 }] });
  expect(warning({ ...alphas(1), interaction: pair(2, 79) }, 'chargesDiffer')).toBeUndefined();
  expect(warning({ ...alphas(1), interaction: pair(2, 29) }, 'chargesDiffer')?.message).toMatch(
    /Z1 Z2 = 58, Alpha particle and Au-197 have 158/,
  );
  const neutrons = { ...alphas(1), projectile: { species: 'neutron' }, interaction: pair(2, 79) };
  expect(warning(neutrons, 'chargesDiffer')).toBeDefined();

  const ion = { species: 'custom', mass: Q(4, 'u'), charge: 1, spin: 0 };
  const partly = { ...alphas(1), projectile: ion, interaction: pair(2, 79) };
  expect(warning(partly, 'chargesDiffer')).toBeUndefined();

  const atom = { terms: [{ form: 'atomicElectron', element: 'C' }] };
  const onCarbon = { target: { kind: 'nuclide', nuclide: 'C-12' }, interaction: atom };
  expect(warning({ interaction: atom }, 'chargesDiffer')).toBeUndefined();
  expect(warning(onCarbon, 'chargesDiffer')).toBeUndefined();
  const onGold = { ...onCarbon, target: { kind: 'nuclide', nuclide: 'Au-197' } };
  expect(warning(onGold, 'chargesDiffer')?.message).toMatch(/Z1 Z2 = -6, .* have -79/);
});

test('lengths of the neutron table are those of slow neutrons', () => {
  const vanadium = (energy: number) => ({
    projectile: { species: 'neutron' },
    energy: Q(energy, 'eV'),
    interaction: { terms: [{ form: 'contact', nuclide: 'V-51' }] },
  });
  expect(warning(vanadium(0.0253), 'lengthForSlowNeutrons')).toBeUndefined();
  expect(warning(vanadium(1e6), 'lengthForSlowNeutrons')?.level).toBe('caution');
});

test('absorption that the table of lengths cannot give', () => {
  const slow = (nuclide: string) => ({
    projectile: { species: 'neutron' },
    energy: Q(25.3, 'meV'),
    interaction: { terms: [{ form: 'contact', nuclide }] },
  });
  // Boron-10 absorbs 3,835 barn at 2200 m/s; V. F. Sears, Neutron News 3 no. 3 (1992) 26.
  expect(warning(slow('B-10'), 'absorptionLeftOut')).toMatchObject({
    level: 'caution',
    message: expect.stringMatching(/3835 barn at 1\.798 angstrom/) as string,
  });
  expect(warning(slow('Ne-20'), 'absorptionLeftOut')?.level).toBe('info');
  expect(warning(slow('H-2'), 'absorptionLeftOut')).toBeUndefined();
  // He-3 has its imaginary length in the table: 4 pi b''/k is 5,333 barn to the digits of b''.
  expect(warning(slow('He-3'), 'absorptionLeftOut')).toBeUndefined();
  const { absorption } = born1(answer({ ...CONTRACT_BODY, ...slow('He-3') }));
  expectRelative(integral(absorption).value, 5333e-8, 5e-3);
});
