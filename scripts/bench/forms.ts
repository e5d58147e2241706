import { FORMS } from '#server/physics/potentials/register.ts';
import type { AnyParameter, Term } from '#server/physics/potentials/types.ts';
import { toInternal } from '#shared/units/quantity.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { measure, shown } from './measure.ts';

const POINTS = 181;

function valueOf({ default: given, dimension }: AnyParameter): number | undefined {
  if (typeof given === 'number') return given;
  return typeof given === 'object' && 'unit' in given && 'value' in given
    ? toInternal(given as Quantity, dimension as Dimension)
    : undefined;
}

/** A term with the defaults of its register, for an electron on charge 6; undefined where defaults are no numbers. */
function defaultTerm(form: (typeof FORMS)[number]): Term | undefined {
  const entries = form.parameters.map((parameter) => [parameter.key, valueOf(parameter)] as const);
  if (entries.some(([, value]) => value === undefined)) return undefined;
  const values = Object.fromEntries(entries) as Record<string, number>;
  return form.build(values, { twoMuOverHbar2: 0.2625, projectileCharge: -1, targetCharge: 6 });
}

/** Every form with numeric parameters: its transform at 181 values of q up to 40/range, closed and by quadrature. */
export function benchForms(): void {
  console.log('\nTransforms at 181 q up to 40/range: closed form, quadrature, largest difference');
  for (const form of FORMS) {
    const term = defaultTerm(form);
    const { closed, quadrature } = term ?? { closed: null, quadrature: null };
    if (!term || !closed) {
      console.log(`  ${form.key.padEnd(18)} no closed transform from numeric defaults`);
      continue;
    }
    const scale = term.range ?? 1;
    const q = Array.from({ length: POINTS }, (_, i) => (40 * (i + 1)) / POINTS / scale);
    const fast = measure(() => q.forEach((one) => closed(one)), 50);
    const compared = quadrature && q.some((one) => quadrature(one).evaluations > 0);
    const slow = compared ? measure(() => q.forEach((one) => quadrature(one)), 2) : undefined;
    const forward = Math.max(...q.map((one) => Math.abs(closed(one).value)));
    const apart = compared
      ? Math.max(...q.map((one) => Math.abs(closed(one).value - quadrature(one).value))) / forward
      : undefined;
    const rest =
      slow && apart !== undefined
        ? `${shown(slow.best).padStart(10)}  ${apart.toExponential(1)} of the largest, closed faster by ${(slow.best / fast.best).toFixed(0)}`
        : '         -  nothing to integrate';
    console.log(`  ${form.key.padEnd(18)} ${shown(fast.best).padStart(10)} ${rest}`);
  }
}
