/**
 * Angles and energies of an elastic collision with a target at rest, between the centre of mass and the lab.
 *
 * With rho = v_cm/v1* (velocity of the centre of mass over that of the projectile in it) and gamma the Lorentz factor of the centre of mass,
 * tan(thetaLab) = sin(theta) / (gamma (cos(theta) + rho)). Without relativity gamma = 1 and rho = m1/m2. A fixed target has rho = 0, gamma = 1.
 */
export interface Frame {
  rho: number;
  /** rho - 1, computed without subtracting: the cone of a nearly equal target depends on it. */
  rhoMinusOne: number;
  gamma: number;
  /** Largest lab angle, rad: pi if the projectile is the lighter, pi/2 (not reached) at equal masses, the edge of the cone (not reached) if it is the heavier. */
  thetaMax: number;
  /** Kinetic energy kept by the projectile after a head-on collision, as a fraction. */
  keptHeadOn: number;
  /** Largest fraction of the kinetic energy the target can take: what a head-on collision gives it. */
  lostHeadOn: number;
}

export interface LabAngle {
  /** rad */
  thetaLab: number;
  /** dΩ_cm/dΩ_lab: multiply a centre-of-mass cross section by it to have that of the lab. */
  jacobian: number;
}

export interface CmAngle {
  /** rad */
  thetaCm: number;
  /** dΩ_cm/dΩ_lab, as above. */
  jacobian: number;
}

/**
 * Lab angle of a centre-of-mass angle, and the ratio of solid angles
 * D³/(gamma |1 + rho cos(theta)|), D² = sin²(theta) + gamma² (cos(theta) + rho)².
 * @param thetaCm rad, 0 to pi
 * @returns thetaLab in rad, 0 to pi; the Jacobian is infinite at the very edge of a heavy projectile's cone
 * Error: a few ulps, but for the Jacobian near the edge of the cone, where 1 + rho cos(theta) itself loses digits (labToCm does not).
 */
export function cmToLab(thetaCm: number, frame: Frame): LabAngle {
  if (frame.rho === 0) return { thetaLab: thetaCm, jacobian: 1 };
  const cosHalf = Math.cos(thetaCm / 2);
  const cos = Math.cos(thetaCm);
  const { rho, rhoMinusOne, gamma } = frame;
  const across = 2 * Math.sin(thetaCm / 2) * cosHalf;
  // Where the projectile turns round, cos(theta) + rho and 1 + rho cos(theta) cancel for nearly equal masses: half angles do not.
  const turned = cos < -0.5;
  const shifted = turned ? 2 * cosHalf ** 2 + rhoMinusOne : cos + rho;
  const slope = turned ? 2 * rho * cosHalf ** 2 - rhoMinusOne : 1 + rho * cos;
  const along = gamma * shifted;
  const distance = Math.hypot(across, along);
  return {
    thetaLab: Math.atan2(across, along),
    jacobian: distance ** 3 / (gamma * Math.abs(slope)),
  };
}

/** sqrt(cos²L - gamma² (rho² - 1) sin²L), the discriminant of labToCm, as a product where it would cancel near the edge of the cone. */
function discriminant(thetaLab: number, frame: Frame): number {
  const { rho, rhoMinusOne, gamma, thetaMax } = frame;
  if (rhoMinusOne > 0) {
    return (
      Math.sqrt(Math.sin(thetaMax - thetaLab) * Math.sin(thetaMax + thetaLab)) / Math.sin(thetaMax)
    );
  }
  const sin = Math.sin(thetaLab);
  return Math.sqrt(Math.cos(thetaLab) ** 2 - gamma ** 2 * rhoMinusOne * (rho + 1) * sin ** 2);
}

/**
 * Centre-of-mass angles that a projectile seen at this lab angle may have had, with the ratio of solid angles of each.
 * With A = gamma sin(L), B = cos(L), R² = A² + B², S² = R² - rho² A²: theta = phi + asin(rho A/R), phi = atan2(A, B), and for a heavier projectile
 * also phi + pi - asin(rho A/R); Jacobian gamma² (rho B ± S)²/(R⁴ S).
 * @param thetaLab rad, 0 to pi
 * @returns no branch where the angle cannot be reached (the edge itself and, at equal masses, 90 degrees included); one for a projectile not heavier than its target; two inside
 *   the cone of a heavier one, the forward one first
 * Error: a few ulps of the angle; near the edge of the cone that of the given angle, magnified as the Jacobian is.
 */
export function labToCm(thetaLab: number, frame: Frame): CmAngle[] {
  const { rho, rhoMinusOne, gamma, thetaMax } = frame;
  const reachable = rhoMinusOne < 0 ? thetaLab <= Math.PI : thetaLab < thetaMax;
  if (!(thetaLab >= 0) || !reachable) return [];
  if (rho === 0) return [{ thetaCm: thetaLab, jacobian: 1 }];
  const a = gamma * Math.sin(thetaLab);
  const b = Math.cos(thetaLab);
  const r2 = a * a + b * b;
  const s = discriminant(thetaLab, frame);
  const phi = Math.atan2(a, b);
  const turn = Math.atan2(rho * a, s);
  // rho B + S cancels backward, rho B - S near equal masses: (rho B + S)(rho B - S) = (rho² - 1) R².
  const product = rhoMinusOne * (rho + 1) * r2;
  const forwardSum = b >= 0 ? rho * b + s : product / (rho * b - s);
  const scale = (gamma / r2) ** 2 / s;
  const forward = { thetaCm: phi + turn, jacobian: scale * forwardSum ** 2 };
  if (!(rhoMinusOne > 0)) return [forward];
  const backward = {
    thetaCm: phi + (Math.PI - turn),
    jacobian: scale * (product / forwardSum) ** 2,
  };
  return [forward, backward];
}

/** Lab angle at which the target recoils, rad: atan2(cos(theta/2), gamma sin(theta/2)). A fixed target does not move; the limit of a very heavy one is given. */
export function recoilAngle(thetaCm: number, frame: Frame): number {
  return Math.atan2(Math.cos(thetaCm / 2), frame.gamma * Math.sin(thetaCm / 2));
}

/**
 * Fraction of its kinetic energy that the projectile keeps, the kinematic factor K: kept + lost cos²(theta/2), with kept and lost those of a head-on
 * collision; a sum of positive terms, so that a projectile brought nearly to rest is exact too.
 */
export function kinematicFactor(thetaCm: number, frame: Frame): number {
  return frame.keptHeadOn + frame.lostHeadOn * Math.cos(thetaCm / 2) ** 2;
}

/** Fraction of the kinetic energy that the target takes: lost sin²(theta/2). */
export function recoilFraction(thetaCm: number, frame: Frame): number {
  return frame.lostHeadOn * Math.sin(thetaCm / 2) ** 2;
}
