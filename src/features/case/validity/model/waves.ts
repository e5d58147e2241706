import type { PlotSeries } from '#src/components/plot-types.ts';
import { fullDigits } from '#shared/units/format.ts';
import type { Estimate, PhaseShift } from '#shared/contracts/estimates.ts';
import { without } from '../../model/without.ts';
import { computedOf } from './methods.ts';

export interface Complex {
  re: number;
  im: number;
}

/** The waves of the exact calculation; a wall has no first order, and the zeros that stand for it are no phases. */
export function wavesOf(estimate: Estimate): PhaseShift[] {
  const waves = computedOf(estimate, 'partialWaves')?.phaseShifts ?? [];
  const none = computedOf(estimate, 'born1') === null && waves.every(({ born = 0 }) => born === 0);
  return none ? waves.map((wave) => without(wave, 'born')) : waves;
}

/** T_l = (S_l - 1)/2i of a wave with S_l = η exp(2iδ). */
export function transition({ delta, eta }: Pick<PhaseShift, 'delta' | 'eta'>): Complex {
  return { re: (eta * Math.sin(2 * delta)) / 2, im: (1 - eta * Math.cos(2 * delta)) / 2 };
}

/** First order has the phase itself for T_l: no wave may scatter more than all of itself. */
export function breaksUnitarity({ born }: PhaseShift): boolean {
  return born !== undefined && Math.abs(born) > 1;
}

export function jText(j: number): string {
  return `${Math.round(2 * j)}/2`;
}

/** `l = 3`, with a spin-orbit term `l = 3, j = 7/2`. */
export function waveName({ l, j }: PhaseShift): string {
  return `l = ${l}${j === undefined ? '' : `, j = ${jText(j)}`}`;
}

const SHOWN_SHARE = 1e-3;
const SHOWN_LEAST = 4;

/** The last l that a picture can tell from nothing: the many waves beyond it stand in the table. */
export function lastShown(waves: readonly PhaseShift[]): number {
  const size = ({ delta, eta, born = 0 }: PhaseShift) =>
    Math.max(Math.abs(delta), Math.abs(born), Math.abs(1 - eta));
  const largest = waves.reduce((most, wave) => Math.max(most, size(wave)), 0);
  const last = waves.reduce(
    (l, wave) => (size(wave) > SHOWN_SHARE * largest ? Math.max(l, wave.l) : l),
    SHOWN_LEAST,
  );
  return Math.min(last, waves.at(-1)?.l ?? last);
}

interface Group {
  key: string;
  name: string;
  waves: PhaseShift[];
}

/** Waves of one kind: all of them, or with a spin-orbit term those of spin up and those of spin down. */
export function groupsOf(waves: readonly PhaseShift[]): Group[] {
  if (!waves.some(({ j }) => j !== undefined)) {
    return [{ key: 'delta', name: 'exact', waves: [...waves] }];
  }
  const up = waves.filter(({ l, j }) => j === undefined || j > l);
  const down = waves.filter(({ l, j }) => j !== undefined && j < l);
  return [
    { key: 'up', name: 'exact, j = l + ½', waves: up },
    { key: 'down', name: 'exact, j = l − ½', waves: down },
  ];
}

const STYLES: Readonly<Record<string, number>> = { delta: 1, up: 1, down: 3 };

/** δ_l over l, exact and in first order. */
export function phaseSeries(waves: readonly PhaseShift[]): PlotSeries[] {
  const exact = groupsOf(waves).map(({ key, name, waves: own }): PlotSeries => ({
    key,
    name,
    style: STYLES[key] ?? 1,
    marks: true,
    points: own.map(({ l, delta }) => [l, delta]),
  }));
  // First order knows no spin-orbit term, so one wave of each l speaks for both.
  const first = waves.filter(({ l }, place) => waves.findIndex((wave) => wave.l === l) === place);
  if (!first.some(({ born }) => born !== undefined)) return exact;
  return [
    ...exact,
    {
      key: 'born',
      name: 'first Born',
      style: 0,
      marks: true,
      points: first.map(({ l, born }) => [l, born ?? null]),
    },
  ];
}

/** |S_l| over l: what of each wave comes out elastically. */
export function sizeSeries(waves: readonly PhaseShift[]): PlotSeries[] {
  return groupsOf(waves).map(({ key, name, waves: own }): PlotSeries => ({
    key,
    name,
    style: STYLES[key] ?? 1,
    marks: true,
    points: own.map(({ l, eta }) => [l, eta]),
  }));
}

/** T_l in its plane, exact and, on the real axis where first order always is, in first order. */
export function transitionSeries(waves: readonly PhaseShift[]): PlotSeries[] {
  const exact = groupsOf(waves).map(({ key, name, waves: own }): PlotSeries => ({
    key,
    name,
    style: STYLES[key] ?? 1,
    marks: true,
    points: own.map((wave) => {
      const { re, im } = transition(wave);
      return [re, im];
    }),
  }));
  const [lead] = groupsOf(waves);
  if (!lead?.waves.some(({ born }) => born !== undefined)) return exact;
  return [
    ...exact,
    {
      key: 'born',
      name: 'first Born',
      style: 0,
      marks: true,
      points: lead.waves.flatMap(({ born }): [number, number | null][] =>
        born === undefined ? [] : [[born, 0]],
      ),
    },
  ];
}

const ROUND = 181;

/** |S_l| = 1 in the plane of T_l: a wave on it is scattered, one inside it partly absorbed, none can be outside. */
export const UNITARITY_CIRCLE: PlotSeries['points'] = Array.from({ length: ROUND }, (_, i) => {
  const angle = (2 * Math.PI * i) / (ROUND - 1);
  return [Math.sin(angle) / 2, (1 - Math.cos(angle)) / 2];
});

export const DEGREES = 180 / Math.PI;

/** Every wave with all digits: names, units, rows. */
export function waveRows(waves: readonly PhaseShift[]): string[][] {
  const spin = waves.some(({ j }) => j !== undefined);
  const number = (value: number | undefined) => (value === undefined ? '' : fullDigits(value));
  return [
    [
      'l',
      ...(spin ? ['j'] : []),
      'delta',
      'delta',
      '|S_l|',
      'Re T_l',
      'Im T_l',
      'delta first Born',
      'error of delta',
    ],
    ['1', ...(spin ? ['1'] : []), 'rad', 'deg', '1', '1', '1', 'rad', 'rad'],
    ...waves.map((wave) => {
      const { re, im } = transition(wave);
      return [
        String(wave.l),
        ...(spin ? [number(wave.j)] : []),
        number(wave.delta),
        number(wave.delta * DEGREES),
        number(wave.eta),
        number(re),
        number(im),
        number(wave.born),
        number(wave.absoluteError),
      ];
    }),
  ];
}
