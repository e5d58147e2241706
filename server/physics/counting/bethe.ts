import { AVOGADRO, CONSTANTS, ELECTRON_MASS } from '#server/physics/constants/codata2022.ts';

/** A charged projectile that loses energy. */
export interface Slowed {
  /** mc², eV. */
  mass: number;
  charge: number;
  kind: 'electron' | 'positron' | 'heavy';
}

/** What it loses it in. */
export interface Medium {
  /** Z/A, mol/g. */
  electronsPerGram: number;
  /** Mean excitation energy, eV. */
  excitation: number;
}

const CM_PER_ANGSTROM = 1e-8;
/** 4π N_A r_e² m_e c², eV cm²/mol: 0.307 MeV cm²/mol. */
const SCALE =
  4 *
  Math.PI *
  AVOGADRO *
  (CONSTANTS.classicalElectronRadius.value * CM_PER_ANGSTROM) ** 2 *
  ELECTRON_MASS;
const LEAST_BETA_GAMMA = 0.05;
const MOST_BETA_GAMMA = 1000;
const ELECTRON_RANGE = { least: 1e4, most: 2e6 } as const;
/** Exponent of the charge that an ion keeps, 1 - exp(-125 β Z^(-2/3)), below which it is no longer bare to 2 %. */
const STRIPPED = 4;
const STEPS = 16;

interface Speed {
  gamma: number;
  beta2: number;
}

function speedOf(energy: number, mass: number): Speed {
  const gamma = 1 + energy / mass;
  return { gamma, beta2: (energy * (energy + 2 * mass)) / (energy + mass) ** 2 };
}

/** Why the formula cannot be used at this energy, in words; null where it can. */
export function betheObstacle(energy: number, { mass, charge, kind }: Slowed): string | null {
  if (kind !== 'heavy') {
    if (energy >= ELECTRON_RANGE.least && energy <= ELECTRON_RANGE.most) return null;
    return 'the formula is used for electrons and positrons from 10 keV to 2 MeV: below it atomic shells count, above it the density effect';
  }
  const { gamma, beta2 } = speedOf(energy, mass);
  const betaGamma = Math.sqrt(beta2) * gamma;
  if (!(betaGamma >= LEAST_BETA_GAMMA)) {
    return `the formula holds above βγ of about ${LEAST_BETA_GAMMA} (1.2 MeV a nucleon), and this projectile has ${betaGamma.toPrecision(2)}; use tables of stopping powers`;
  }
  if (betaGamma > MOST_BETA_GAMMA) return 'radiation outweighs ionisation at this energy';
  const bare = (125 * Math.sqrt(beta2)) / Math.cbrt(Math.abs(charge)) ** 2;
  if (Math.abs(charge) > 1 && bare < STRIPPED) {
    return 'at this speed the ion carries electrons of its own, so that its charge is less than that of the nucleus; use tables of stopping powers';
  }
  return null;
}

function heavy({ gamma, beta2 }: Speed, { mass, charge }: Slowed, { excitation }: Medium): number {
  const ratio = ELECTRON_MASS / mass;
  const bg2 = beta2 * gamma * gamma;
  const most = (2 * ELECTRON_MASS * bg2) / (1 + 2 * gamma * ratio + ratio * ratio);
  const logarithm = Math.log((2 * ELECTRON_MASS * bg2 * most) / excitation ** 2) / 2;
  return ((charge * charge) / beta2) * (logarithm - beta2);
}

/** Berger and Seltzer: collisions of like particles (Møller) and of a particle with its antiparticle (Bhabha). */
function light({ beta2 }: Speed, energy: number, isPositron: boolean, { excitation }: Medium) {
  const tau = energy / ELECTRON_MASS;
  const common = Math.log((energy / excitation) ** 2 * (1 + tau / 2));
  const electron = (1 - beta2) * (1 + (tau * tau) / 8 - (2 * tau + 1) * Math.LN2);
  const t2 = tau + 2;
  const positron = 2 * Math.LN2 - (beta2 / 12) * (23 + 14 / t2 + 10 / t2 ** 2 + 4 / t2 ** 3);
  return (common + (isPositron ? positron : electron)) / (2 * beta2);
}

/**
 * Mean energy loss by ionisation and excitation.
 *
 * Formula: heavy particles K z² (Z/A)(1/β²)[½ ln(2 m_e c² β²γ² W/I²) - β²], K = 4π N_A r_e² m_e c²; electrons and positrons
 * K (Z/A)(1/2β²)[ln(T²/I²) + ln(1 + τ/2) + F(τ)], τ = T/m_e c².
 *
 * @param energy kinetic, eV, where `betheObstacle` is null
 * @returns eV cm²/g
 *
 * Validity: see `betheObstacle`; without shell and density corrections: 1 to 3 % near the lower end (10 MeV protons in water 0.6 %).
 *
 * Source: Review of Particle Physics, chapter Passage of particles through matter; ICRU Report 37 (1984).
 */
export function stoppingPower(energy: number, particle: Slowed, medium: Medium): number {
  const speed = speedOf(energy, particle.mass);
  const bracket =
    particle.kind === 'heavy'
      ? heavy(speed, particle, medium)
      : light(speed, energy, particle.kind === 'positron', medium);
  return SCALE * medium.electronsPerGram * bracket;
}

/**
 * Mean energy lost on the way to a depth.
 *
 * Formula: dE/dx = -S(E), by Runge-Kutta steps of fourth order on the whole thickness and a cubic between them.
 *
 * @param energy at the entrance, eV
 * @param thickness along the beam, g/cm²
 * @returns loss in eV as a function of the depth (share of the thickness, 0 to 1), or why there is none, in words
 *
 * Validity: mean loss only; straggling is left out.
 */
export function meanLoss(
  energy: number,
  thickness: number,
  particle: Slowed,
  medium: Medium,
): { lossTo: (depth: number) => number } | { none: string } {
  const obstacle = betheObstacle(energy, particle);
  if (obstacle !== null) return { none: obstacle };
  const h = thickness / STEPS;
  const slope = (e: number) => (e > 0 ? -stoppingPower(e, particle, medium) : NaN);
  const energies = [energy];
  for (let e = energy; energies.length <= STEPS; energies.push(e)) {
    const k1 = slope(e);
    const k2 = slope(e + (h / 2) * k1);
    const k3 = slope(e + (h / 2) * k2);
    const k4 = slope(e + h * k3);
    e += (h / 6) * (k1 + 2 * k2 + 2 * k3 + k4);
    if (!(e > 0) || betheObstacle(e, particle) !== null) {
      return {
        none: 'the projectile leaves the range of the energy-loss formula, or stops, inside the target; take a thinner one',
      };
    }
  }
  return { lossTo: (depth) => lossBetween(energies, slope, h, depth) };
}

/** Hermite's cubic between two steps: their energies and slopes are known. */
function lossBetween(
  energies: readonly number[],
  slope: (e: number) => number,
  h: number,
  depth: number,
): number {
  const at = Math.min(STEPS - 1, Math.max(0, Math.floor(depth * STEPS)));
  const t = depth * STEPS - at;
  const first = energies[0] ?? NaN;
  const [a, b] = [energies[at] ?? NaN, energies[at + 1] ?? NaN];
  const [sa, sb] = [h * slope(a), h * slope(b)];
  const value = a + t * (sa + t * (3 * (b - a) - 2 * sa - sb + t * (2 * (a - b) + sa + sb)));
  return first - value;
}
