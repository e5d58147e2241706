import type { DetectorSent } from '#shared/contracts/run-plans.ts';
import { toInternal } from '#shared/units/quantity.ts';
import type { Faults } from '#server/modules/estimates/faults.ts';
import {
  halfAngleOfCone,
  halfAngleOfDisc,
  solidAngleOfCone,
} from '#server/physics/counting/cone.ts';
import type { PlanDetector } from '#server/physics/plan.ts';

const DEGREE = Math.PI / 180;

/** Half of the opening, rad, and the solid angle, sr; null with faults. */
function opening(
  { solidAngle, distance, apertureRadius }: DetectorSent,
  path: string,
  faults: Faults,
): { halfAngle: number; solidAngle: number } | null {
  if (solidAngle !== undefined) {
    if (distance && apertureRadius) {
      faults.add(
        `${path}/solidAngle`,
        'Give the solid angle, or distance and apertureRadius, not both: one of them decides.',
      );
      return null;
    }
    return { halfAngle: halfAngleOfCone(solidAngle), solidAngle };
  }
  if (!distance || !apertureRadius) {
    const missing = distance ? 'apertureRadius' : apertureRadius ? 'distance' : 'solidAngle';
    faults.add(
      `${path}/${missing}`,
      'A detector needs distance and apertureRadius, or its solidAngle in steradian.',
    );
    return null;
  }
  const halfAngle = halfAngleOfDisc(
    toInternal(apertureRadius, 'length'),
    toInternal(distance, 'length'),
  );
  return { halfAngle, solidAngle: solidAngleOfCone(halfAngle) };
}

function toDetector(sent: DetectorSent, path: string, faults: Faults): PlanDetector | undefined {
  const found = opening(sent, path, faults);
  if (!found) return undefined;
  const { halfAngle, solidAngle } = found;
  return {
    name: sent.name,
    angle: sent.angle,
    side: sent.angle < 0 ? -1 : 1,
    cone: { theta: Math.min(Math.abs(sent.angle) * DEGREE, Math.PI), halfAngle },
    solidAngle,
    efficiency: sent.efficiency ?? 1,
    deadTime: {
      tau: sent.deadTime ? toInternal(sent.deadTime, 'time') : 0,
      model: sent.deadTimeModel ?? 'nonParalysable',
    },
    background: sent.backgroundRate ? toInternal(sent.backgroundRate, 'rate') : 0,
  };
}

/** The detectors of a run, or faults at their fields. */
export function toDetectors(sent: readonly DetectorSent[], faults: Faults): PlanDetector[] {
  const names = new Set<string>();
  return sent.flatMap((one, i) => {
    const path = `/detectors/${i}`;
    if (names.has(one.name)) {
      faults.add(`${path}/name`, `There are two detectors named ${one.name}; rename one.`);
    }
    names.add(one.name);
    const detector = toDetector(one, path, faults);
    return detector ? [detector] : [];
  });
}
