import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import { isOriginal } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { MAX_SCAN_POINTS, MAX_SCAN_VALUES } from '#shared/contracts/scans.ts';
import type { ScanRequest } from '#shared/contracts/scans.ts';
import { DomainError } from '#shared/errors.ts';
import { askedAngles } from '#server/modules/estimates/to-angles.ts';
import { readAxis } from './axes.ts';
import type { Axis } from './axes.ts';
import { withValueAt } from './pointer.ts';

/** Where totals and verdicts are computed: they know no angle. */
const ANY_ANGLE = { unit: 'deg', values: [90] };

/** A value that stands twice on an axis is computed once: parts run over the distinct values, the first axis slowest. */
export class Grid {
  readonly axes: Axis[];
  /** Distinct values of each axis. */
  private readonly distinct: number[][];
  private readonly base: EstimateRequest;

  constructor(private readonly request: ScanRequest) {
    this.axes = request.axes.map((axis, i) => readAxis(axis, i, request.estimate));
    this.distinct = this.axes.map(({ values }) => [...new Set(values)]);
    this.base = bareEstimate(request);
    this.checkSize();
  }

  private checkSize(): void {
    const points = this.axes.reduce((product, { values }) => product * values.length, 1);
    const numbers = points * (this.request.output === 'dcs' ? this.angles.values.length : 1);
    if (points > MAX_SCAN_POINTS) {
      throw new DomainError(
        'invalidInput',
        `A scan may have at most ${MAX_SCAN_POINTS} points; this one has ${points}.`,
        { errors: [{ path: '/axes', message: `${points} points are too many.` }] },
      );
    }
    if (numbers > MAX_SCAN_VALUES) {
      const message = `Points times angles may be at most ${MAX_SCAN_VALUES}; this scan has ${numbers}. Ask for fewer angles or points.`;
      throw new DomainError('invalidInput', `/axes: ${message}`, {
        errors: [{ path: '/axes', message }],
      });
    }
  }

  /** Distinct points. */
  get total(): number {
    return this.distinct.reduce((product, values) => product * values.length, 1);
  }

  get angles() {
    return askedAngles(this.request.estimate);
  }

  /** What the part computes: the estimate with this point's values, by the one method. */
  bodyOf(part: number): EstimateRequest {
    let rest = part;
    let body = this.base;
    for (let i = this.axes.length - 1; i >= 0; i -= 1) {
      const { path, unit } = this.axes[i] ?? { path: '', unit: null };
      const values = this.distinct[i] ?? [];
      const value = values[rest % values.length] ?? NaN;
      rest = Math.floor(rest / values.length);
      body = withValueAt(body, path, unit === null ? value : { value, unit });
    }
    return body;
  }

  /** For each point in order, the part that holds its value. */
  parts(): number[] {
    const places = this.axes.map(({ values }, i) => {
      const at = new Map((this.distinct[i] ?? []).map((value, place) => [value, place]));
      return values.map((value) => at.get(value) ?? 0);
    });
    const [first = [], second] = places;
    if (!second) return first;
    const width = this.distinct[1]?.length ?? 1;
    return first.flatMap((row) => second.map((column) => row * width + column));
  }
}

/** A term without the text its table was read from, which may be long and is never computed with. */
function withoutOriginal(term: InteractionTerm): InteractionTerm {
  const { form, ...rest } = term;
  return {
    ...Object.fromEntries(Object.entries(rest).filter(([, value]) => !isOriginal(value))),
    form,
  };
}

/** Without what changes no cross section, so that equal points have equal content. */
function bareEstimate({ estimate, method, output }: ScanRequest): EstimateRequest {
  const { projectile, target, energy, kinematics, interaction } = estimate;
  const { frame, identical, corrections, units, angles } = estimate;
  return {
    projectile,
    target,
    energy,
    interaction: { terms: interaction.terms.map(withoutOriginal) },
    methods: [method],
    ...(kinematics && { kinematics }),
    ...(frame && { frame }),
    ...(identical !== undefined && { identical }),
    ...(corrections && { corrections }),
    ...(units && { units }),
    ...(output === 'dcs' ? angles && { angles } : { angles: ANY_ANGLE }),
  };
}
