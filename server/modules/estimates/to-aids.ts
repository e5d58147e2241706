import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import type { AidsAsked } from '#server/physics/reading-aids.ts';
import { Faults } from './faults.ts';
import { askedAngles, toRadians } from './to-angles.ts';

/** Two angles of a request in rad, or faults below `path`, where they stand in what was sent. */
export function toAngleRange(
  range: { from: number; to: number },
  unit: string,
  path: string,
  faults: Faults,
): { from: number; to: number } | undefined {
  const read = (end: 'from' | 'to'): number | null => {
    const radians = toRadians(range[end], unit);
    if (radians === null) {
      faults.add(
        `${path}/${end}`,
        `Scattering angles lie between 0 and 180 degrees; this is ${range[end]} ${unit}.`,
      );
    }
    return radians;
  };
  const from = read('from');
  const to = read('to');
  if (from === null || to === null) return undefined;
  if (to > from) return { from, to };
  faults.add(
    `${path}/to`,
    `The range ends at ${range.to} ${unit} and begins at ${range.from} ${unit}: give the smaller angle as "from".`,
  );
  return undefined;
}

/** What is asked beside the estimate, with units ended. Throws DomainError('invalidInput') with the fields at fault. */
export function toAids(request: EstimateRequest): AidsAsked {
  const { angleRange: sent, reference = false, kinematics = false } = request.aids ?? {};
  if (sent === undefined) return { reference, kinematics };
  const faults = new Faults();
  const { unit } = askedAngles(request);
  const angleRange = toAngleRange(sent, unit, '/aids/angleRange', faults);
  faults.throwIfAny();
  return { reference, kinematics, ...(angleRange && { angleRange }) };
}
