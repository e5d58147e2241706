import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import type { AidsAsked } from '#server/physics/reading-aids.ts';
import { Faults } from './faults.ts';
import { askedAngles, toRadians } from './to-angles.ts';

/** What is asked beside the estimate, with units ended. Throws DomainError('invalidInput') with the fields at fault. */
export function toAids(request: EstimateRequest): AidsAsked {
  const { angleRange, reference = false, kinematics = false } = request.aids ?? {};
  const asked: AidsAsked = { reference, kinematics };
  if (angleRange === undefined) return asked;
  const faults = new Faults();
  const { unit } = askedAngles(request);
  const read = (end: 'from' | 'to'): number | null => {
    const radians = toRadians(angleRange[end], unit);
    if (radians === null) {
      faults.add(
        `/aids/angleRange/${end}`,
        `Scattering angles lie between 0 and 180 degrees; this is ${angleRange[end]} ${unit}.`,
      );
    }
    return radians;
  };
  const from = read('from');
  const to = read('to');
  if (from !== null && to !== null && !(to > from)) {
    faults.add(
      '/aids/angleRange/to',
      `The range ends at ${angleRange.to} ${unit}, before it begins at ${angleRange.from} ${unit}: give the smaller angle as "from".`,
    );
  }
  faults.throwIfAny();
  return { ...asked, angleRange: { from: from ?? 0, to: to ?? 0 } };
}
