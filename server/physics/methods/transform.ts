import { DomainError } from '#shared/errors.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import type { Term } from '#server/physics/potentials/types.ts';

const NOTHING: NumericalResult = { value: 0, error: 0, evaluations: 0, status: 'converged' };

/** What closed form and quadrature must agree to: 1e-9 of the value, or 1e-14 of ∫ r² |s| dr where that is larger. */
function goodEnough({ value, error }: NumericalResult, norm: number): boolean {
  return error <= Math.max(1e-9 * Math.abs(value), 1e-14 * norm);
}

/**
 * Transform of one shape without the Coulomb tail it may have.
 *
 * Formula: S(q) - c/q².
 *
 * @param term shape s(r), r in angstrom
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns value and a bound of its error; nothing for a bare point charge
 * @throws as `transform`
 */
export function transformWithoutTail(term: Term, q: number): NumericalResult {
  if (term.coulombTail === 0) return transform(term, q);
  return term.withoutTail?.(q) ?? NOTHING;
}

/**
 * Transform of one shape by the better of its two routes.
 *
 * Formula: S(q) = ∫_0^∞ r² s(r) j0(qr) dr, closed form first; the quadrature where the closed form loses digits.
 *
 * @param term shape s(r), r in angstrom
 * @param q momentum transfer, 1/angstrom, >= 0
 * @returns S(q) and a bound of its error, rounding included
 * @throws DomainError('invalidInput') for a form without first order, with its reason; 'tooMuchWork' where neither route gives a value
 *
 * Validity: q = 0 diverges for a Coulomb tail and must not be asked.
 */
export function transform(term: Term, q: number): NumericalResult {
  if (term.noBorn !== undefined) throw new DomainError('invalidInput', term.noBorn);
  const closed = term.closed?.(q);
  if (closed && goodEnough(closed, term.norm)) return closed;
  const numerical = term.quadrature?.(q);
  const routes = [closed, numerical].filter(
    (route): route is NumericalResult => route !== undefined && Number.isFinite(route.value),
  );
  const [first, second] = routes;
  if (first === undefined) {
    throw new DomainError(
      'tooMuchWork',
      `The transform of the ${term.form} form cannot be computed at q = ${q.toPrecision(4)} per angstrom: the product of q and its range is too large. Lower the energy, the largest angle or the range.`,
    );
  }
  return second && second.error < first.error ? second : first;
}
