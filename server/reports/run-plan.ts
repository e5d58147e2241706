import type { PlannedDetector, RunPlan, RunPlanBody } from '#shared/contracts/run-plans.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { plainNumber, plainQuantity } from '#server/documents/plain-quantity.ts';
import { unitSymbol } from '#shared/units/format.ts';
import { MUTED } from './paper.ts';
import type { Paper } from './paper.ts';
import type { ReportInput } from './report-input.ts';
import { drawPairs, drawTable, rowsThatFit } from './table.ts';
import type { Column } from './table.ts';
import {
  METHOD_NAMES,
  PLAN_VERDICTS,
  amount,
  amountOr,
  duration,
  durationOr,
  number,
  percent,
  short,
} from './words.ts';

interface Planned {
  sent: RunPlanBody;
  plan: RunPlan;
}

/** The plan as saved: what was sent, and what came out. */
export function plannedRun({ version }: ReportInput): Planned | null {
  const { runPlan: sent } = version.document;
  const { runPlan: plan } = version.result;
  return sent && plan ? { sent, plan } : null;
}

function beamText({ sent, plan }: Planned): string {
  const { current, chargeState, dutyFactor, energySpread } = sent.beam;
  const parts = [
    `${amount(plan.beamRate)}`,
    ...(current ? [`${plainQuantity(current)} at charge state ${chargeState ?? 1}`] : []),
    ...(dutyFactor === undefined ? [] : [`duty factor ${plainNumber(dutyFactor)}`]),
    ...(energySpread ? [`energy spread ${plainQuantity(energySpread)} (standard deviation)`] : []),
  ];
  return parts.join(', ');
}

function targetText({ sent, plan }: Planned): string {
  const { foil, gas } = sent;
  const density = `${amount(plan.arealDensity)} of ${plan.scatterer}`;
  if (gas) {
    return `gas ${gas.formula}, ${plainQuantity(gas.pressure)}, ${plainQuantity(gas.temperature)}, ${plainQuantity(gas.length)} long; ${density}`;
  }
  const parts = [
    ...(foil?.formula ? [`foil ${foil.formula}`] : ['foil']),
    ...(foil?.thickness ? [plainQuantity(foil.thickness)] : []),
    ...(foil?.density ? [plainQuantity(foil.density)] : []),
    ...(foil?.tilt ? [`tilted by ${plainNumber(foil.tilt)}°`] : []),
  ];
  return `${parts.join(', ')}; ${density}`;
}

const VERDICT_SIZE = 11;

function timesOf({ totalTime, totalTimeInTurn }: RunPlan): [string, string][] {
  if ('unavailable' in totalTime) return [['Beam time', durationOr(totalTime)]];
  const atOnce = `${duration(totalTime)} with all detectors at once`;
  return [['Beam time', `${atOnce}; one position after the other: ${durationOr(totalTimeInTurn)}`]];
}

/** Verdict, beam, target and times of a plan: what both kinds of report say. */
export function drawPlanInBrief(paper: Paper, planned: Planned): void {
  const { plan } = planned;
  const verdict = `Run plan: ${PLAN_VERDICTS[plan.verdict]}`;
  paper.text(verdict, { face: 'bold', size: VERDICT_SIZE });
  const { message, detector } = plan.decidedBy;
  paper.text(detector ? `Decided by ${detector}: ${message}` : message);
  const precision = `${plainNumber(100 * plan.aim.relativePrecision)} %`;
  const asked = plan.aim.beamTime ? ` within ${duration(plan.aim.beamTime)} of beam` : '';
  drawPairs(paper, [
    ['Beam of the run', beamText(planned)],
    ['Target of the run', targetText(planned)],
    ['Aim', `${precision} standard uncertainty of the net counts${asked}`],
    ...timesOf(plan),
  ]);
  paper.skip(3);
}

const right = { align: 'right' } as const;

function rateColumns(plan: RunPlan): Column[] {
  const unit = plan.detectors.find((one) => one.averagedDcs)?.averagedDcs?.unit;
  return [
    { head: 'Detector', share: 1.3 },
    { head: 'θ lab (°)', share: 0.9, ...right },
    { head: 'ΔΩ (sr)', share: 1.4, ...right },
    { head: `mean dσ/dΩ\nlab${unit ? ` (${unitSymbol(unit)})` : ''}`, share: 1.6, ...right },
    { head: 'true rate (1/s)', share: 1.4, ...right },
    { head: 'observed (1/s)', share: 1.4, ...right },
    { head: 'dead', share: 0.9, ...right },
    { head: 'time', share: 1.1, ...right },
    { head: 'detection limit (1/s)', share: 1.4, ...right },
  ];
}

const bare = (quantity: Quantity): string => number(quantity.value);

function rateRow(one: PlannedDetector): string[] {
  const { timeForPrecision: time, detectionLimit: limit } = one;
  return [
    one.name,
    plainNumber(one.angle),
    number(one.solidAngle),
    one.averagedDcs ? bare(one.averagedDcs) : 'divergent',
    bare(one.trueRate),
    bare(one.observedRate),
    percent(one.deadTimeFraction),
    'unavailable' in time ? 'none' : duration(time.total),
    'unavailable' in limit ? 'none' : short(limit.value),
  ];
}

/** Detectors with rates and times; with `bottom`, as many as go above it, the rest counted. */
export function drawRates(paper: Paper, { plan }: Planned, bottom?: number): void {
  const columns = rateColumns(plan);
  const all = plan.detectors;
  const fitting = bottom === undefined ? all.length : rowsThatFit(paper, columns, bottom);
  const shown = fitting >= all.length ? all : all.slice(0, Math.max(0, fitting - 2));
  if (shown.length > 0) drawTable(paper, columns, shown.map(rateRow));
  if (shown.length < all.length) {
    const rest = all.length - shown.length;
    paper.text(`${rest} more of ${all.length} detectors stand in the full report.`, {
      size: 8,
      colour: MUTED,
    });
  }
}

/** Why a detector has no cross section, no time or no limit. */
export function drawReasons(paper: Paper, { plan }: Planned): void {
  for (const { name, reason, timeForPrecision, detectionLimit, averagedDcs } of plan.detectors) {
    const reasons = [
      averagedDcs === null ? reason : undefined,
      'unavailable' in timeForPrecision ? timeForPrecision.reason : undefined,
      'unavailable' in detectionLimit ? detectionLimit.reason : undefined,
    ].filter((text) => text !== undefined);
    const distinct = [...new Set(reasons)];
    if (distinct.length > 0) paper.text(`${name}: ${distinct.join(' ')}`);
  }
}

/** What the run does to the target and the target to the beam. */
export function drawTargetChecks(paper: Paper, { plan }: Planned): void {
  const { target } = plan;
  const beyond =
    target.collisionsBeyond === undefined
      ? ''
      : ` (collisions that turn the projectile by more than ${number(target.collisionsBeyond)}°)`;
  paper.heading('Target checks', 2);
  drawPairs(paper, [
    ['Cross section by', METHOD_NAMES[plan.method]],
    ['n t σ along the beam', `${number(target.collisions)}${beyond}`],
    ...(target.radiationLengths === undefined
      ? []
      : [['Radiation lengths', number(target.radiationLengths)] as const]),
    ['Multiple scattering', amountOr(target.multipleScattering)],
    ['Energy loss', amountOr(target.energyLoss)],
    ['Beam power', amount(target.beamPower)],
    ['Power in the target', amountOr(target.depositedPower)],
    ['Atoms', plan.atoms.map((atom) => `${atom.name} ${amount(atom.arealDensity)}`).join(', ')],
  ]);
}

/** Positions in order, with the clock of the run. */
export function drawRunSheet(paper: Paper, { plan }: Planned): void {
  const { runSheet } = plan;
  paper.heading('Run sheet', 2);
  if ('unavailable' in runSheet) {
    paper.text(`None: ${runSheet.reason}`);
    return;
  }
  const { total, shifts, shift } = runSheet;
  paper.text(
    `${duration(total)} in ${shifts} ${shifts === 1 ? 'shift' : 'shifts'} of ${duration(shift)}.`,
  );
  drawTable(
    paper,
    [
      { head: 'Position', share: 2 },
      { head: 'θ lab (°)', share: 1, ...right },
      { head: 'starts at', share: 1.2, ...right },
      { head: 'setup', share: 1.2, ...right },
      { head: 'signal', share: 1.2, ...right },
      { head: 'blank', share: 1.2, ...right },
      { head: 'shift', share: 0.8, ...right },
    ],
    runSheet.positions.map((one) => [
      one.name,
      plainNumber(one.angle),
      duration(one.start),
      duration(one.setup),
      duration(one.signal),
      duration(one.blank),
      String(one.shift),
    ]),
  );
}
