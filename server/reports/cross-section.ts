import { METHODS } from '#shared/contracts/estimates.ts';
import type { ComputedMethod, Estimate, Method } from '#shared/contracts/estimates.ts';
import { unitSymbol } from '#shared/units/format.ts';
import { plainNumber } from '#server/documents/plain-quantity.ts';
import { curvesOf, drawCurve } from './curve-plot.ts';
import { MUTED } from './paper.ts';
import type { Paper } from './paper.ts';
import type { ReportInput } from './report-input.ts';
import { drawTable } from './table.ts';
import { METHOD_NAMES, brief, frameOf, integralText, number, numericsOf, short } from './words.ts';

const INTEGRALS = [
  ['elastic', 'elastic'],
  ['absorption', 'absorption'],
  ['total', 'total'],
  ['momentumTransfer', 'momentum transfer'],
  ['viscosity', 'viscosity'],
] as const;
/** Rows of an appendix at most; of more, every so-manieth is printed. */
const MOST_ROWS = 200;

interface Saved {
  method: Method;
  result: ComputedMethod;
}

export function computedMethods(estimate: Estimate): Saved[] {
  return METHODS.flatMap((method) => {
    const result = estimate.methods[method];
    return result && !('unavailable' in result) ? [{ method, result }] : [];
  });
}

export function drawCrossSection(paper: Paper, { version }: ReportInput, height: number): void {
  const { estimate } = version.result;
  const frame = frameOf(estimate, version.document.target.kind === 'fixed');
  if (!drawCurve(paper, estimate, { height, frame })) {
    paper.text('No method gave a cross section above zero at these angles: there is no curve.');
  }
}

/** Methods that were asked for and gave nothing, each with its reason. */
export function drawUnavailable(paper: Paper, { version }: ReportInput): void {
  for (const method of METHODS) {
    const result = version.result.estimate.methods[method];
    if (result && 'unavailable' in result) {
      paper.text(`${capital(METHOD_NAMES[method])} is not available: ${result.reason}`);
    }
  }
}

/** One line for each method: the proposal's table. */
export function drawTotals(paper: Paper, { version }: ReportInput): void {
  const methods = computedMethods(version.result.estimate);
  if (methods.length === 0) return;
  drawTable(
    paper,
    [
      { head: 'Cross section', share: 2.4 },
      { head: 'elastic', share: 2.4, align: 'right' },
      { head: 'numerical error', share: 2, align: 'right' },
      { head: 'total', share: 2.4, align: 'right' },
      { head: 'momentum transfer', share: 2.4, align: 'right' },
    ],
    methods.map(({ method, result }) => [
      METHOD_NAMES[method],
      integralText(result.elastic),
      'divergent' in result.elastic ? '—' : numericsOf(result.elastic),
      integralText(result.total),
      integralText(result.momentumTransfer),
    ]),
  );
  const reasons = methods.flatMap(({ result: { elastic } }) =>
    'divergent' in elastic ? [elastic.reason] : [],
  );
  for (const reason of new Set(reasons)) paper.text(`Divergent: ${reason}`, { size: 8 });
}

/** Every integral with its error, or that it diverges and why. */
export function drawIntegrals(paper: Paper, { version }: ReportInput): void {
  paper.heading('Integrated cross sections');
  const rows = computedMethods(version.result.estimate).flatMap(({ method, result }) =>
    INTEGRALS.map(([key, name]) => {
      const integral = result[key];
      const error = 'divergent' in integral ? integral.reason : numericsOf(integral);
      return [METHOD_NAMES[method], name, integralText(integral), error];
    }),
  );
  drawTable(
    paper,
    [
      { head: 'Method', share: 2 },
      { head: 'Integral', share: 1.8 },
      { head: 'Value', share: 2, align: 'right' },
      { head: 'Numerical error, or why it diverges', share: 4 },
    ],
    rows,
  );
}

/** Conditions of each method, with their numbers. */
export function drawConditions(paper: Paper, { version }: ReportInput): void {
  const rows = computedMethods(version.result.estimate).flatMap(({ method, result }) =>
    (result.conditions ?? []).map(({ name, value, most, least, holds, meaning }) => [
      METHOD_NAMES[method],
      `${name}: ${meaning}`,
      short(value),
      most !== undefined
        ? `below ${short(most)}`
        : least !== undefined
          ? `above ${short(least)}`
          : '—',
      holds ? 'holds' : 'fails',
    ]),
  );
  if (rows.length === 0) return;
  paper.heading('Conditions of the methods', 2);
  drawTable(
    paper,
    [
      { head: 'Method', share: 1.8 },
      { head: 'Condition', share: 5 },
      { head: 'Value', share: 1.2, align: 'right' },
      { head: 'Wanted', share: 1.4, align: 'right' },
      { head: '', share: 0.8 },
    ],
    rows,
  );
}

/** Evenly chosen, the last one always among them. */
function thinned<T>(rows: readonly T[]): T[] {
  const step = Math.ceil(rows.length / MOST_ROWS);
  return rows.filter((_, index) => index % step === 0 || index === rows.length - 1);
}

function sayThinned(paper: Paper, all: number, shown: number, what: string): void {
  if (shown === all) return;
  paper.text(`${shown} of ${all} ${what} are printed; the saved version holds all of them.`, {
    colour: MUTED,
  });
}

/** The curves as numbers. */
export function drawNumbers(paper: Paper, { version }: ReportInput): void {
  const { estimate } = version.result;
  const curves = curvesOf(estimate);
  const [first] = curves;
  if (!first) return;
  const { area, angle } = estimate.units;
  const frame = frameOf(estimate, version.document.target.kind === 'fixed');
  paper.heading('Differential cross section in numbers');
  const indices = thinned(first.points.map((_, index) => index));
  paper.text(`dσ/dΩ in ${unitSymbol(`${area}/sr`)} against θ in ${unitSymbol(angle)}, ${frame}.`);
  sayThinned(paper, first.points.length, indices.length, 'angles');
  const value = (at: number, { points }: (typeof curves)[number]) => {
    const dcs = points[at]?.dcs;
    return dcs === null || dcs === undefined ? 'none' : number(dcs);
  };
  drawTable(
    paper,
    [
      { head: `θ (${unitSymbol(angle)})`, share: 1, align: 'right' },
      ...curves.map(({ method }) => ({
        head: METHOD_NAMES[method],
        share: 2,
        align: 'right' as const,
      })),
    ],
    indices.map((at) => [
      plainNumber(first.points[at]?.theta ?? 0),
      ...curves.map((curve) => value(at, curve)),
    ]),
  );
}

/** Phase shifts of the exact calculation. */
export function drawPhases(paper: Paper, { version }: ReportInput): void {
  const exact = version.result.estimate.methods.partialWaves;
  if (!exact || 'unavailable' in exact || !exact.phaseShifts?.length) return;
  const phases = thinned(exact.phaseShifts);
  paper.heading('Phase shifts');
  sayThinned(paper, exact.phaseShifts.length, phases.length, 'phase shifts');
  drawTable(
    paper,
    [
      { head: 'l', share: 0.6, align: 'right' },
      { head: 'j', share: 0.6, align: 'right' },
      { head: 'δ (rad)', share: 2, align: 'right' },
      { head: 'error (rad)', share: 1.2, align: 'right' },
      { head: '|S|', share: 1.6, align: 'right' },
      { head: 'first Born (rad)', share: 2, align: 'right' },
    ],
    phases.map(({ l, j, delta, absoluteError, eta, born }) => [
      String(l),
      j === undefined ? '—' : `${2 * j}/2`,
      number(delta),
      brief(absoluteError),
      number(eta),
      born === undefined ? '—' : number(born),
    ]),
  );
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
