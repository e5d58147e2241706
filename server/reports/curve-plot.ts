import { METHODS } from '#shared/contracts/estimates.ts';
import type { Estimate, Method } from '#shared/contracts/estimates.ts';
import { unitSymbol } from '#shared/units/format.ts';
import { INK, LINE, MUTED } from './paper.ts';
import type { Paper } from './paper.ts';
import { decadeScale, linearScale } from './scales.ts';
import type { Scale } from './scales.ts';
import { METHOD_NAMES } from './words.ts';

interface Look {
  colour: string;
  /** Lengths of line and gap; empty for a solid line. */
  dash: number[];
}

const LOOKS: Record<Method, Look> = {
  born1: { colour: '#9E2B25', dash: [] },
  born2: { colour: '#8A5A00', dash: [7, 3] },
  eikonal: { colour: '#256047', dash: [1.5, 2.5] },
  partialWaves: { colour: '#2F5570', dash: [8, 2.5, 1.5, 2.5] },
};
const LARGEST_MARKED = 40;

interface Curve {
  method: Method;
  points: { theta: number; dcs: number | null }[];
}
interface Frame {
  left: number;
  top: number;
  width: number;
  height: number;
  x: Scale;
  y: Scale;
}

export function curvesOf(estimate: Estimate): Curve[] {
  return METHODS.flatMap((method) => {
    const result = estimate.methods[method];
    if (!result || 'unavailable' in result) return [];
    return [{ method, points: result.differential.map(({ theta, dcs }) => ({ theta, dcs })) }];
  });
}

/** dσ/dΩ of every saved method against the angle, drawn as lines; false where there is nothing to draw. */
export function drawCurve(
  paper: Paper,
  estimate: Estimate,
  { height, frame: frameName }: { height: number; frame: string },
): boolean {
  const curves = curvesOf(estimate);
  const points = curves.flatMap((curve) => curve.points);
  const y = decadeScale(points.flatMap(({ dcs }) => (dcs === null ? [] : [dcs])));
  if (!y) return false;
  paper.need(height);
  const thetas = points.map(({ theta }) => theta);
  const x = linearScale(
    thetas.reduce((a, b) => Math.min(a, b)),
    thetas.reduce((a, b) => Math.max(a, b)),
  );
  const top = paper.y + 16;
  const frame = { left: paper.left + 52, top, width: paper.width - 60, height: height - 52, x, y };
  drawLegend(paper, curves, frame.left);
  drawAxes(paper, frame);
  drawTitles(paper, frame, estimate, frameName);
  for (const curve of curves) drawOne(paper, frame, curve);
  paper.goTo(top - 16 + height);
  return true;
}

const placeX = ({ left, width, x }: Frame, theta: number) =>
  left + (width * (theta - x.from)) / (x.to - x.from);
const placeY = ({ top, height, y }: Frame, log: number) =>
  top + (height * (y.to - log)) / (y.to - y.from);

function drawLegend(paper: Paper, curves: readonly Curve[], start: number): void {
  const { document, y } = paper;
  let x = start;
  for (const { method } of curves) {
    stroke(paper, LOOKS[method], () => document.moveTo(x, y + 6).lineTo(x + 26, y + 6));
    paper.use('plain', 8);
    document.text(METHOD_NAMES[method], x + 30, y, { lineBreak: false });
    x += 46 + document.widthOfString(METHOD_NAMES[method]);
  }
}

function stroke(paper: Paper, { colour, dash }: Look, path: () => void): void {
  const { document } = paper;
  document.save();
  document.lineWidth(1.2).lineJoin('round').strokeColor(colour);
  // As an operator of the page: the types of `dash` know no list of lengths.
  if (dash.length > 0) document.addContent(`[${dash.join(' ')}] 0 d`);
  path();
  document.stroke().restore();
}

function drawAxes(paper: Paper, frame: Frame): void {
  const { document } = paper;
  const { left, top, width, height, x, y } = frame;
  const foot = top + height;
  document.lineWidth(0.4).strokeColor(LINE);
  for (const tick of x.ticks) {
    const at = placeX(frame, tick);
    document.moveTo(at, top).lineTo(at, foot).stroke();
  }
  for (const tick of y.ticks) {
    const at = placeY(frame, tick);
    document
      .moveTo(left, at)
      .lineTo(left + width, at)
      .stroke();
  }
  document.rect(left, top, width, height).lineWidth(0.7).stroke(MUTED);
  paper.use('plain', 7.5);
  for (const tick of x.ticks) {
    const label = Number(tick.toPrecision(6)).toString().replace('-', '−');
    const at = placeX(frame, tick) - document.widthOfString(label) / 2;
    document.text(label, at, foot + 3, { lineBreak: false });
  }
  for (const tick of y.ticks) {
    const label = powerOfTen(tick);
    const at = left - 5 - document.widthOfString(label);
    document.text(label, at, placeY(frame, tick) - 5, { lineBreak: false });
  }
}

/** `10⁻³`; 1 and 10 as such. */
function powerOfTen(power: number): string {
  if (power === 0 || power === 1) return String(10 ** power);
  const digits = [...String(Math.abs(power))].map((digit) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(digit)] ?? '');
  return `10${power < 0 ? '⁻' : ''}${digits.join('')}`;
}

function drawTitles(paper: Paper, frame: Frame, estimate: Estimate, frameName: string): void {
  const { document } = paper;
  const { left, top, width, height } = frame;
  const { area, angle } = estimate.units;
  paper.use('plain', 8.5, INK);
  const across = `scattering angle θ (${unitSymbol(angle)}), ${frameName}`;
  const below = left + (width - document.widthOfString(across)) / 2;
  document.text(across, below, top + height + 16, { lineBreak: false });
  const upward = `dσ/dΩ (${unitSymbol(`${area}/sr`)})`;
  const middle = top + height / 2 + document.widthOfString(upward) / 2;
  document.save();
  document.rotate(-90, { origin: [paper.left, middle] });
  document.text(upward, paper.left, middle, { lineBreak: false });
  document.restore();
}

/** A line broken where the curve has no number; single numbers, and few of them, are marked. */
function drawOne(paper: Paper, frame: Frame, { method, points }: Curve): void {
  const { document } = paper;
  const ordered = [...points].sort((a, b) => a.theta - b.theta);
  document.save();
  document.rect(frame.left, frame.top, frame.width, frame.height).clip();
  stroke(paper, LOOKS[method], () => {
    let pen = false;
    for (const { theta, dcs } of ordered) {
      if (dcs === null || !(dcs > 0)) {
        pen = false;
        continue;
      }
      const [x, y] = [placeX(frame, theta), placeY(frame, Math.log10(dcs))];
      if (pen) document.lineTo(x, y);
      else document.moveTo(x, y);
      pen = true;
    }
  });
  if (ordered.length <= LARGEST_MARKED) {
    for (const { theta, dcs } of ordered) {
      if (dcs === null || !(dcs > 0)) continue;
      const [x, y] = [placeX(frame, theta), placeY(frame, Math.log10(dcs))];
      document.circle(x, y, 1.6).fill(LOOKS[method].colour);
    }
  }
  document.restore();
}
