import type { Projectile, Species, Target } from '#shared/contracts/estimates.ts';

const SYMBOLS =
  'H He Li Be B C N O F Ne Na Mg Al Si P S Cl Ar K Ca Sc Ti V Cr Mn Fe Co Ni Cu Zn Ga Ge As Se Br Kr Rb Sr Y Zr Nb Mo Tc Ru Rh Pd Ag Cd In Sn Sb Te I Xe Cs Ba La Ce Pr Nd Pm Sm Eu Gd Tb Dy Ho Er Tm Yb Lu Hf Ta W Re Os Ir Pt Au Hg Tl Pb Bi Po At Rn Fr Ra Ac Th Pa U Np Pu Am Cm Bk Cf'.split(
    ' ',
  );

const CHARGES: Record<Species, number> = {
  electron: -1,
  positron: 1,
  'muon-': -1,
  'muon+': 1,
  proton: 1,
  neutron: 0,
  deuteron: 1,
  triton: 1,
  helion: 2,
  alpha: 2,
};

/** Atomic number of `Cu` or of `Cu-63`; null for a name that begins with no element. */
export function atomicNumberOf(name: string): number | null {
  const place = SYMBOLS.indexOf(name.split('-')[0] ?? '');
  return place < 0 ? null : place + 1;
}

/** Charge number of a projectile or a target, nuclei bare. */
export function chargeNumberOf(particle: Projectile | Target): number | null {
  if ('charge' in particle) return particle.charge;
  if ('nuclide' in particle) return atomicNumberOf(particle.nuclide);
  return 'species' in particle ? CHARGES[particle.species] : null;
}
