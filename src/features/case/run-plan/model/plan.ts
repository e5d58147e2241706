import { composedFactor } from '#shared/units/composed.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { DetectorSent, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { chargeNumberOf } from '../../aids/model/charge-numbers.ts';
import { without } from '../../model/without.ts';

const Q = (value: number, unit: string) => ({ value, unit });

/** A beam to begin with: an electric current where its particles carry charge, as far as the browser knows. */
export function startBeam(
  { projectile }: CaseDocument,
  kind: 'current' | 'particles' = 'current',
): RunPlanBody['beam'] {
  const charge = chargeNumberOf(projectile);
  if (kind === 'particles' || charge === null || charge === 0) return { particlesPerSecond: 1e6 };
  return { current: Q(1, 'nA'), chargeState: charge };
}

export const FIRST_DETECTOR: DetectorSent = {
  name: 'D1',
  angle: 30,
  distance: Q(100, 'mm'),
  apertureRadius: Q(5, 'mm'),
};

/** Collisions a particle meets in a target to begin with: single scattering holds with room to spare. */
const FEW_COLLISIONS = 0.01;
const PER_CM2 = 1e15;
/** A milligram of carbon has 5e19 nuclei: a target to begin with is not much thicker. */
const MOST_EXPONENT = 20;

/** Scatterers per cm² that keep collisions few at this total cross section, a power of ten. */
function startArealDensity(total: Quantity | null): number {
  if (!total || !(total.value > 0)) return PER_CM2;
  const area = total.value * composedFactor(total.unit, 'cm2');
  const most = FEW_COLLISIONS / area;
  return 10 ** Math.max(0, Math.min(MOST_EXPONENT, Math.floor(Math.log10(most))));
}

/**
 * A plan to begin with. What a person must decide (efficiency, dead time, background) is left out, and the answer says so.
 * `total` is the elastic cross section where it is known: it decides how thin the first target is.
 */
export function startPlan(document: CaseDocument, total: Quantity | null): RunPlanBody {
  return {
    method: document.methods.includes('born1') ? 'born1' : (document.methods[0] ?? 'born1'),
    beam: startBeam(document),
    foil: { arealDensity: Q(startArealDensity(total), '1/cm2') },
    detectors: [FIRST_DETECTOR],
    aim: { relativePrecision: 0.02 },
  };
}

/** A document with its plan changed; without a plan there is nothing to change. */
export function withPlan(
  document: CaseDocument,
  change: (plan: RunPlanBody) => RunPlanBody,
): CaseDocument {
  return document.runPlan ? { ...document, runPlan: change(document.runPlan) } : document;
}

type Members = 'beam' | 'foil' | 'gas' | 'aim' | 'uncertainties';

const EMPTY_MAY_GO: readonly Members[] = ['aim', 'uncertainties'];

/** One value of a part of the plan put, or left out where it is undefined. */
export function putIn<P extends Members>(part: P, key: keyof NonNullable<RunPlanBody[P]>) {
  return (document: CaseDocument, value: unknown): CaseDocument =>
    withPlan(document, (plan) => {
      const before: object = plan[part] ?? {};
      if (value !== undefined) return { ...plan, [part]: { ...before, [key]: value } };
      const rest = without(before as Record<string, unknown>, String(key));
      const nothing = Object.keys(rest).length === 0 && EMPTY_MAY_GO.includes(part);
      return nothing ? without(plan, part as 'aim' | 'uncertainties') : { ...plan, [part]: rest };
    });
}

export function changeDetector(
  document: CaseDocument,
  index: number,
  change: (detector: DetectorSent) => DetectorSent,
): CaseDocument {
  return withPlan(document, (plan) => ({
    ...plan,
    detectors: plan.detectors.map((one, i) => (i === index ? change(one) : one)),
  }));
}

export function putInDetector(index: number, key: keyof DetectorSent) {
  return (document: CaseDocument, value: unknown): CaseDocument =>
    changeDetector(document, index, (detector) => ({
      ...without(detector, key),
      ...(value !== undefined && { [key]: value }),
      name: key === 'name' && typeof value === 'string' ? value : detector.name,
      angle: key === 'angle' && typeof value === 'number' ? value : detector.angle,
    }));
}

/** A name that no detector has yet. */
function freeName(detectors: readonly DetectorSent[]): string {
  const taken = new Set(detectors.map(({ name }) => name));
  let n = detectors.length + 1;
  while (taken.has(`D${n}`)) n += 1;
  return `D${n}`;
}

/** A copy of the last detector 15 degrees further out. */
export function addDetector(plan: RunPlanBody): RunPlanBody {
  const last = plan.detectors.at(-1) ?? FIRST_DETECTOR;
  const angle = Math.min(180, last.angle + 15);
  return {
    ...plan,
    detectors: [...plan.detectors, { ...last, name: freeName(plan.detectors), angle }],
  };
}

/** The plan without one of its detectors; a monitor that goes is a monitor no more. */
export function removeDetector(plan: RunPlanBody, index: number): RunPlanBody {
  const gone = plan.detectors[index];
  const rest = gone && plan.monitor === gone.name ? without(plan, 'monitor') : plan;
  return { ...rest, detectors: plan.detectors.filter((_, i) => i !== index) };
}

/** All detectors with the opening and the counter of one of them; names and angles stay. */
export function allLike(plan: RunPlanBody, index: number): RunPlanBody {
  const model = plan.detectors[index];
  if (!model) return plan;
  return {
    ...plan,
    detectors: plan.detectors.map(({ name, angle }) => ({ ...model, name, angle })),
  };
}

export interface Series {
  from: number;
  to: number;
  step: number;
}

/** Positions of one detector at even steps, in place of all there were. */
export function withSeries(plan: RunPlanBody, { from, to, step }: Series): RunPlanBody {
  const model = plan.detectors[0] ?? FIRST_DETECTOR;
  const count = Math.floor((to - from) / step + 1e-9) + 1;
  const detectors = Array.from({ length: count }, (_, i) => ({
    ...model,
    name: `D${i + 1}`,
    angle: Number((from + i * step).toPrecision(12)),
  }));
  const named = detectors.some(({ name }) => name === plan.monitor);
  return { ...(named ? plan : without(plan, 'monitor')), detectors };
}
