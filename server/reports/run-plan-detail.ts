import type { PlannedDetector, RunPlan } from '#shared/contracts/run-plans.ts';
import { unitSymbol } from '#shared/units/format.ts';
import type { Paper } from './paper.ts';
import { drawTable } from './table.ts';
import { amount, number, percent, short } from './words.ts';

const FACTORS: Record<PlannedDetector['factors'][number]['name'], string> = {
  beamRate: 'beam rate',
  arealDensity: 'areal density',
  slant: 'slant of the target',
  dcs: 'dσ/dΩ at the centre',
  solidAngle: 'solid angle',
  efficiency: 'efficiency',
};
const INPUTS: Record<PlannedDetector['uncertaintyBudget'][number]['input'], string> = {
  current: 'current',
  thickness: 'thickness',
  density: 'density',
  efficiency: 'efficiency',
  solidAngle: 'solid angle',
  background: 'background',
  energy: 'energy',
  angle: 'angle',
};
const right = { align: 'right' } as const;

type Factor = PlannedDetector['factors'][number];

/** Factors of the beam and the target are those of every detector. */
const COMMON: readonly Factor['name'][] = ['beamRate', 'arealDensity', 'slant'];
const OWN: readonly Factor['name'][] = ['dcs', 'solidAngle', 'efficiency'];

function factorText({ name, value, unit }: Factor): string {
  return `${FACTORS[name]} ${unit === '1' ? number(value) : amount({ value, unit })}`;
}

/** The product that anyone can check by hand, and what averaging makes of it. */
export function drawFactors(paper: Paper, { detectors }: RunPlan): void {
  const [first] = detectors;
  if (!first) return;
  const common = first.factors.filter(({ name }) => COMMON.includes(name));
  const unitOf = (name: Factor['name']) =>
    detectors.flatMap(({ factors }) => factors).find((factor) => factor.name === name)?.unit ?? '1';
  paper.heading('Rates, factor by factor', 2);
  paper.text(
    `Common to all detectors: ${common.map(factorText).join(', ')}. The product is that of these and the three factors of the detector; the average multiplies it by what stands right of it.`,
  );
  drawTable(
    paper,
    [
      { head: 'Detector', share: 1.3 },
      ...OWN.map((name) => ({ head: headOf(FACTORS[name], unitOf(name)), share: 1.3, ...right })),
      { head: 'product (1/s)', share: 1.3, ...right },
      { head: '× acceptance', share: 1.2, ...right },
      { head: '× energies', share: 1.2, ...right },
      { head: '× attenuation', share: 1.2, ...right },
    ],
    detectors.map((one) => [
      one.name,
      ...OWN.map((name) => {
        const factor = one.factors.find((known) => known.name === name);
        return factor ? number(factor.value) : '—';
      }),
      one.product ? number(one.product.value) : '—',
      number(one.averaging.acceptance),
      number(one.averaging.energies),
      number(one.averaging.attenuation),
    ]),
  );
}

function headOf(name: string, unit: string): string {
  return unit === '1' ? name : `${name} (${unitSymbol(unit)})`;
}

/** Where the uncertainty of each detector comes from. */
export function drawBudget(paper: Paper, { detectors }: RunPlan): void {
  paper.heading('Uncertainty budget', 2);
  const lines = detectors.flatMap((one) => [
    ...one.uncertaintyBudget.map((line) => [
      one.name,
      INPUTS[line.input],
      line.input === 'angle'
        ? `${short(line.relativeStandardUncertainty)}°`
        : percent(line.relativeStandardUncertainty),
      line.input === 'angle' ? `${short(line.sensitivity)} /°` : short(line.sensitivity),
      percent(line.contribution),
      `${line.type}, ${line.distribution}`,
      line.freedom === null ? '∞' : short(line.freedom),
      line.shared ? 'all detectors' : 'this one',
    ]),
    combinedRow(one),
  ]);
  drawTable(
    paper,
    [
      { head: 'Detector', share: 1.3 },
      { head: 'Input', share: 1.8 },
      { head: 'std. uncertainty', share: 1.2, ...right },
      { head: 'sensitivity', share: 1.2, ...right },
      { head: 'contribution', share: 1.2, ...right },
      { head: 'type, distribution', share: 1.5 },
      { head: 'freedom', share: 0.9, ...right },
      { head: 'shared by', share: 1.2 },
    ],
    lines,
  );
}

function combinedRow({
  name,
  combined,
  combinedWithCounting,
  expanded,
}: PlannedDetector): string[] {
  const { coverageFactor, relative, coverage, freedom } = expanded;
  return [
    name,
    `combined ${percent(combined)}`,
    '',
    'with counting',
    percent(combinedWithCounting),
    `k = ${short(coverageFactor)}: ${percent(relative)}`,
    freedom === null ? '∞' : short(freedom),
    `${percent(coverage)} coverage`,
  ];
}
