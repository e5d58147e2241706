import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import type { FormPicture } from '#shared/contracts/reference.ts';
import { potentialCurve } from '#server/physics/observables/potential-curve.ts';
import type { PotentialCurve } from '#server/physics/observables/potential-curve.ts';
import { transform } from '#server/physics/methods/transform.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import type { Problem } from '#server/physics/problem.ts';
import { AnswerUnits } from '#server/modules/estimates/answer-units.ts';
import { toProblem } from '#server/modules/estimates/to-problem.ts';
import { formRemarks } from './form-remarks.ts';

const POINTS = 241;
/** Momentum transfers are drawn to this many inverse ranges. */
const RANGES = 12;
/** How many sizes of a charge its 1/r potential is drawn to. */
const SIZES = 5;

/** A 1/r tail would fill the picture: where such a term has a size, the curve ends a few of them out. */
function curveOf(term: Term, wavelength: number): PotentialCurve {
  const { v, range, coulombTail, strength } = term;
  if (v === null || range === null || coulombTail === 0) return potentialCurve([term], wavelength);
  const r = Array.from({ length: POINTS }, (_, i) => (SIZES * range * (i + 1)) / POINTS);
  const shapes = r.map(v);
  return {
    r,
    v: shapes.map((shape) => ({ re: strength.re * shape, im: strength.im * shape })),
    note: null,
  };
}

function potentialOf(
  term: Term,
  { collision }: Problem,
  units: AnswerUnits,
): FormPicture['potential'] {
  const curve = curveOf(term, collision.wavelength);
  if ('unavailable' in curve) return { unavailable: true, reason: curve.unavailable };
  if (curve.v.every(({ re, im }) => re === 0 && im === 0)) {
    return { unavailable: true, reason: 'Infinite inside its radius and zero outside: no curve.' };
  }
  const absorbs = curve.v.some(({ im }) => im !== 0);
  return {
    r: curve.r.map((r) => units.lengthOf(r)),
    re: curve.v.map(({ re }) => units.energyOf(re)),
    ...(absorbs && { im: curve.v.map(({ im }) => units.energyOf(im)) }),
    unit: { r: units.length, v: units.energy },
  };
}

/** A bare 1/r tail diverges at q = 0, so its curve begins beside it. */
function momenta(term: Term, k: number): number[] {
  const most = term.range === null ? 2 * k : RANGES / term.range;
  const first = term.coulombTail === 0 ? 0 : 2;
  return Array.from({ length: POINTS - first }, (_, i) => (most * (i + first)) / (POINTS - 1));
}

function transformOf(term: Term, k: number, units: AnswerUnits): FormPicture['transform'] {
  if (term.noBorn !== undefined) return { unavailable: true, reason: term.noBorn };
  const q = momenta(term, k);
  const points = q.map((at) => transform(term, at));
  const { re, im } = term.strength;
  const largest = Math.max(...points.map(({ value }) => Math.abs(value)));
  const worst = Math.max(...points.map(({ error }) => error));
  return {
    q: q.map((at) => units.inverseLengthOf(at)),
    re: points.map(({ value }) => units.volumeEnergyOf(re * value)),
    ...(im !== 0 && { im: points.map(({ value }) => units.volumeEnergyOf(im * value)) }),
    error: largest > 0 ? worst / largest : worst,
    unit: { q: `1/${units.length}`, s: units.volumeEnergyUnit },
  };
}

export interface FormSheet {
  picture: FormPicture;
  remarks: string[];
}

/** V(r), its transform and what is to be said of the one term of a document, in its units; run by an engine thread. */
export function drawForm(request: EstimateRequest): FormSheet {
  const problem = toProblem(request);
  const units = new AnswerUnits(request);
  const [term] = problem.terms;
  if (!term) throw new Error('A form was drawn without a term.');
  return {
    picture: {
      potential: potentialOf(term, problem, units),
      transform: transformOf(term, problem.collision.k, units),
    },
    remarks: formRemarks(term, units),
  };
}
