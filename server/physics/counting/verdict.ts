export type PlanVerdict = 'feasible' | 'tight' | 'notFeasible' | 'singleScatteringNotValid';

/** What decided, in words; `detector` where it is one of them. */
export interface Decision {
  verdict: PlanVerdict;
  factor: 'collisions' | 'noSignal' | 'deadTime' | 'time' | 'uncertainty';
  detector: string | null;
  message: string;
}

export interface Judged {
  name: string;
  /** Sample and blank, s; null without a signal. */
  total: number | null;
  reason: string | null;
  /** Share of the events that the counter misses. */
  deadTimeFraction: number;
  /** Of the inputs, relative. */
  combined: number;
}

export interface PlanJudged {
  collisions: number;
  detectors: readonly Judged[];
  /** s; null where some detector never gets there. */
  totalTime: number | null;
  precision: number;
  /** s; null where none is given. */
  beamTime: number | null;
}

const HOUR = 3600;
/** Without a beam time: three shifts of eight hours are easily asked for, a week is a long run. */
const EASY = 24 * HOUR;
const LONG = 7 * 24 * HOUR;
const RESERVE = 0.8;
const SHARE_LOST = 0.5;

/** A time as people plan it. */
export function spoken(seconds: number): string {
  const round = (value: number) => Number(value.toPrecision(3)).toString();
  if (seconds < 120) return `${round(seconds)} s`;
  if (seconds < 2 * HOUR) return `${round(seconds / 60)} min`;
  if (seconds < 48 * HOUR) return `${round(seconds / HOUR)} h`;
  return `${round(seconds / (24 * HOUR))} d`;
}

const percent = (fraction: number) => `${Number((100 * fraction).toPrecision(3))} %`;

function ofTime({ totalTime, beamTime, precision, detectors }: PlanJudged): Decision {
  const time = totalTime ?? Infinity;
  const slowest = detectors.reduce<Judged | null>(
    (most, one) => ((one.total ?? 0) > (most?.total ?? 0) ? one : most),
    null,
  );
  const easy = beamTime === null ? EASY : RESERVE * beamTime;
  const most = beamTime ?? LONG;
  const verdict = time <= easy ? 'feasible' : time <= most ? 'tight' : 'notFeasible';
  const limit =
    beamTime === null
      ? `without a beam time of your own, ${spoken(EASY)} counts as feasible and ${spoken(LONG)} as the most`
      : `there are ${spoken(beamTime)}, of which ${percent(RESERVE)} are planned with`;
  return {
    verdict,
    factor: 'time',
    detector: slowest?.name ?? null,
    message: `${percent(precision)} takes ${spoken(time)} of beam, sample and blank together; ${limit}.`,
  };
}

/**
 * Whether a run can be done, and the one thing that decides.
 *
 * Rules, the first that applies: more than one collision on the way (single scattering not valid); a detector without signal; time against
 * the beam time (feasible up to 80 % of it, tight up to all of it; without one a day and a week); a counter that misses more than half of the
 * events makes a feasible plan tight, and so do inputs whose uncertainty exceeds the precision aimed at.
 */
export function judgePlan(plan: PlanJudged): Decision {
  const { collisions, detectors, precision } = plan;
  if (collisions > 1) {
    return {
      verdict: 'singleScatteringNotValid',
      factor: 'collisions',
      detector: null,
      message: `A beam particle collides ${Number(collisions.toPrecision(3))} times on its way through the target: rates of single scattering are not valid. Take a target thinner by a factor ${Number((collisions / 0.1).toPrecision(2))}.`,
    };
  }
  const silent = detectors.find(({ total }) => total === null);
  if (silent) {
    return {
      verdict: 'notFeasible',
      factor: 'noSignal',
      detector: silent.name,
      message: `${silent.name} has no rate to plan with: ${silent.reason ?? 'no particle is scattered there'}`,
    };
  }
  const byTime = ofTime(plan);
  if (byTime.verdict !== 'feasible') return byTime;
  const blind = detectors.find(({ deadTimeFraction }) => deadTimeFraction > SHARE_LOST);
  if (blind) {
    return {
      verdict: 'tight',
      factor: 'deadTime',
      detector: blind.name,
      message: `${blind.name} misses ${percent(blind.deadTimeFraction)} of the events by its dead time: lower the current or the solid angle.`,
    };
  }
  const vague = detectors.find(({ combined }) => combined > precision);
  if (vague) {
    return {
      verdict: 'tight',
      factor: 'uncertainty',
      detector: vague.name,
      message: `The inputs of ${vague.name} are uncertain by ${percent(vague.combined)} together, more than the ${percent(precision)} aimed at: counting longer does not help.`,
    };
  }
  return byTime;
}
