import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { DetectorSent, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { without } from '../../model/without.ts';

const Q = (value: number, unit: string) => ({ value, unit });

/** Charge of the projectile, for the current of a beam that starts a plan; null where the browser does not know it. */
const CHARGES: Record<string, number> = {
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

function startBeam({ projectile }: CaseDocument): RunPlanBody['beam'] {
  const species = 'species' in projectile ? projectile.species : null;
  const known = species === null ? undefined : CHARGES[species];
  const charge = species === 'custom' && 'charge' in projectile ? projectile.charge : known;
  if (charge === undefined || charge === 0) return { particlesPerSecond: 1e6 };
  return { current: Q(1, 'nA'), chargeState: charge };
}

export const FIRST_DETECTOR: DetectorSent = {
  name: 'D1',
  angle: 30,
  distance: Q(100, 'mm'),
  apertureRadius: Q(5, 'mm'),
};

/** A plan to begin with. What a person must decide (efficiency, dead time, background) is left out, and the answer says so. */
export function startPlan(document: CaseDocument): RunPlanBody {
  return {
    method: document.methods.includes('born1') ? 'born1' : (document.methods[0] ?? 'born1'),
    beam: startBeam(document),
    foil: { arealDensity: Q(1e17, '1/cm2') },
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

/** One value of a part of the plan put, or left out where it is undefined. */
export function putIn<P extends Members>(part: P, key: keyof NonNullable<RunPlanBody[P]>) {
  return (document: CaseDocument, value: unknown): CaseDocument =>
    withPlan(document, (plan) => {
      const before: object = plan[part] ?? {};
      const rest = without(before as Record<string, unknown>, String(key));
      return { ...plan, [part]: value === undefined ? rest : { ...before, [key]: value } };
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
  return { ...plan, detectors };
}
