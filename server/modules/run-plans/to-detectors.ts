import type { DetectorSent } from '#shared/contracts/run-plans.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { toInternal } from '#shared/units/quantity.ts';
import type { Faults } from '#server/modules/estimates/faults.ts';
import {
  halfAngleOfCone,
  halfAngleOfDisc,
  solidAngleOfCone,
} from '#server/physics/counting/cone.ts';
import type { Shape } from '#server/physics/counting/aperture.ts';
import { solidAngleOfShape } from '#server/physics/counting/aperture.ts';
import type { Cone } from '#server/physics/counting/cone.ts';
import type { PlanDetector } from '#server/physics/plan.ts';

const DEGREE = Math.PI / 180;

type Opening = Pick<PlanDetector, 'solidAngle'> & Pick<Cone, 'halfAngle' | 'shape'>;

function refuse(path: string, message: string, faults: Faults): null {
  faults.add(path, message);
  return null;
}

const ofShape = (shape: Shape): Opening => {
  const solidAngle = solidAngleOfShape(shape);
  return { solidAngle, halfAngle: halfAngleOfCone(solidAngle), shape };
};

function rectangle(
  { width, height, apertureRadius, innerRadius }: DetectorSent,
  distance: number,
  path: string,
  faults: Faults,
): Opening | null {
  if (apertureRadius || innerRadius) {
    const words = 'An aperture has a radius, or a width and a height, not both.';
    return refuse(`${path}/width`, words, faults);
  }
  if (!width || !height) {
    const missing = width ? 'height' : 'width';
    const words = `A rectangular aperture needs its ${missing} too.`;
    return refuse(`${path}/${missing}`, words, faults);
  }
  return ofShape({
    kind: 'rectangle',
    halfWidth: toInternal(width, 'length') / 2 / distance,
    halfHeight: toInternal(height, 'length') / 2 / distance,
  });
}

function round(
  { apertureRadius, innerRadius }: DetectorSent,
  distance: number,
  path: string,
  faults: Faults,
): Opening | null {
  if (!apertureRadius) return refuse(`${path}/apertureRadius`, NEEDED, faults);
  const outer = halfAngleOfDisc(toInternal(apertureRadius, 'length'), distance);
  if (!innerRadius) return { halfAngle: outer, solidAngle: solidAngleOfCone(outer) };
  const inner = halfAngleOfDisc(toInternal(innerRadius, 'length'), distance);
  if (inner < outer) return ofShape({ kind: 'annulus', inner, outer });
  const words = 'The inner radius of an annular detector is smaller than its apertureRadius.';
  return refuse(`${path}/innerRadius`, words, faults);
}

const NEEDED =
  'A detector needs distance and apertureRadius (or width and height), or its solidAngle in steradian.';

/** What a detector sees of the sphere; null with faults. */
function opening(sent: DetectorSent, path: string, faults: Faults): Opening | null {
  const { solidAngle, distance, apertureRadius, width, height } = sent;
  const hasAperture = apertureRadius !== undefined || width !== undefined || height !== undefined;
  if (solidAngle !== undefined) {
    if (!hasAperture) return { halfAngle: halfAngleOfCone(solidAngle), solidAngle };
    const words = 'Give the solid angle, or distance and aperture, not both: one of them decides.';
    return refuse(`${path}/solidAngle`, words, faults);
  }
  if (!distance) {
    const missing = hasAperture ? 'distance' : 'solidAngle';
    return refuse(`${path}/${missing}`, NEEDED, faults);
  }
  const far = toInternal(distance, 'length');
  return width || height ? rectangle(sent, far, path, faults) : round(sent, far, path, faults);
}

const rateOf = (sent: Quantity | undefined): number => (sent ? toInternal(sent, 'rate') : 0);

function toDetector(sent: DetectorSent, path: string, faults: Faults): PlanDetector | undefined {
  const found = opening(sent, path, faults);
  if (!found) return undefined;
  const { halfAngle, solidAngle, shape } = found;
  return {
    name: sent.name,
    angle: sent.angle,
    side: sent.angle < 0 ? -1 : 1,
    cone: {
      theta: Math.min(Math.abs(sent.angle) * DEGREE, Math.PI),
      halfAngle,
      ...(shape && { shape }),
    },
    solidAngle,
    efficiency: sent.efficiency ?? 1,
    deadTime: {
      tau: sent.deadTime ? toInternal(sent.deadTime, 'time') : 0,
      model: sent.deadTimeModel ?? 'nonParalysable',
    },
    background: rateOf(sent.backgroundRate) + rateOf(sent.beamBackgroundRate),
    beamBackground: rateOf(sent.beamBackgroundRate),
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
