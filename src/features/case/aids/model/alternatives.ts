import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';
import type { ComparedKind } from '#shared/mix-ups.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import { massNumberOf } from '../../model/beam-context.ts';
import { without } from '../../model/without.ts';

/** What comes out if a slip is made with the inputs: the document to ask the engine for, and which number of its answer. */
export interface Alternative {
  key: string;
  /** What the other source did, as the end of "The other value …". */
  words: string;
  body: EstimateRequest;
  read: ComparedKind;
}

interface Compared {
  document: CaseDocument;
  estimate: Estimate;
  kind: ComparedKind;
  /** In the unit of the case's angles. */
  theta: number;
}

/** The case at one angle, cheap to ask for. */
export function atAngle(document: CaseDocument, theta: number, unit: string): EstimateRequest {
  const rest = without(document, 'entered', 'format', 'runPlan', 'goldenRule');
  return { ...rest, methods: ['born1'], angles: { unit, values: [theta] } };
}

/** An angle of any size as a scattering angle, rad. */
function folded(radians: number): number {
  const turn = 2 * Math.PI;
  const within = ((radians % turn) + turn) % turn;
  return within > Math.PI ? turn - within : within;
}

function angleSlips({ document, estimate, theta }: Compared): Alternative[] {
  const unit = estimate.units.angle;
  const scale = UNITS.angle[unit] ?? 1;
  const at = (key: string, words: string, radians: number): Alternative[] =>
    radians > 0 && radians <= Math.PI
      ? [{ key, words, body: atAngle(document, radians / scale, unit), read: 'dcs' }]
      : [];
  const radians = theta * scale;
  const degrees = Math.PI / 180;
  const other = estimate.frame === 'cm' ? 'lab' : 'cm';
  const frames: Alternative[] =
    document.target.kind === 'fixed'
      ? []
      : [
          {
            key: 'frame',
            words: `is that of the ${other === 'lab' ? 'lab' : 'centre of mass'} at the same number of degrees`,
            body: { ...atAngle(document, theta, unit), frame: other },
            read: 'dcs',
          },
        ];
  const transfer = (factor: number) => Math.sin(radians / 2) * factor;
  const byTransfer = (key: string, words: string, sine: number) =>
    sine < 1 && estimate.frame === 'cm' ? at(key, words, 2 * Math.asin(sine)) : [];
  return [
    ...frames,
    ...at(
      'radians',
      'was taken at the number of degrees read as radians',
      folded(radians / degrees),
    ),
    ...at(
      'degrees',
      'was taken at the number of radians read as degrees',
      folded(radians * degrees),
    ),
    ...at('half angle', 'was taken at θ/2, as where the angle is called 2θ', radians / 2),
    ...at('double angle', 'was taken at 2θ', 2 * radians),
    ...byTransfer('q for s', 'was taken at s = q/4π read as q', transfer(1 / (4 * Math.PI))),
    ...byTransfer('s for q', 'was taken at q read as s = q/4π', transfer(4 * Math.PI)),
  ];
}

function energySlips(
  { document, estimate }: Compared,
  plain: EstimateRequest,
): Omit<Alternative, 'read'>[] {
  const { energy, target, projectile } = document;
  const moving = target.kind !== 'fixed';
  const inLab = energy.value * composedFactor(energy.unit, estimate.kinematics.energyCm.unit);
  const share = estimate.kinematics.energyCm.value / inLab;
  const at = (key: string, words: string, factor: number) => ({
    key,
    words,
    body: { ...plain, energy: { ...energy, value: energy.value * factor } },
  });
  const nucleons = massNumberOf(projectile) ?? 1;
  const still = { kind: 'fixed', charge: 0 } as const;
  return [
    ...(moving && share < 1
      ? [
          at('energy as cm', 'took the energy for that of the centre of mass', 1 / share),
          at('energy of cm', 'took the energy of the centre of mass for that of the lab', share),
        ]
      : []),
    ...(nucleons > 1
      ? [
          at('per nucleon', 'took the total energy for one per nucleon', nucleons),
          at('total', 'took an energy per nucleon for the total', 1 / nucleons),
        ]
      : []),
    ...(moving && target.kind === 'custom'
      ? [
          {
            key: 'no recoil',
            words: 'leaves the recoil of the target out',
            body: { ...plain, target: { ...still, charge: target.charge } },
          },
        ]
      : []),
    {
      key: 'regime',
      words:
        document.kinematics === 'relativistic'
          ? 'was made without relativity'
          : 'was made with relativistic kinematics',
      body: {
        ...plain,
        kinematics: document.kinematics === 'relativistic' ? 'nonrelativistic' : 'relativistic',
      },
    },
    ...(estimate.identical
      ? [
          {
            key: 'distinguishable',
            words: 'takes the identical particles for different ones',
            body: { ...plain, identical: false },
          },
        ]
      : []),
  ];
}

/** Slips with the inputs whose consequence only the engine knows. */
export function alternativesOf(compared: Compared): Alternative[] {
  const { document, estimate, kind, theta } = compared;
  const plain = atAngle(document, theta, estimate.units.angle);
  const energies = energySlips(compared, plain).map((slip) => ({ ...slip, read: kind }));
  const other: ComparedKind = kind === 'dcs' ? 'total' : 'dcs';
  const swapped: Alternative = {
    key: `is ${other}`,
    words:
      other === 'total'
        ? 'is the elastic total of this case, not per steradian'
        : 'is the value per steradian at this angle, not the total',
    body: plain,
    read: other,
  };
  return kind === 'dcs' ? [...angleSlips(compared), ...energies, swapped] : energies;
}

/** The number an answer holds, in angstrom² (per steradian); null where it has none. */
export function readValue(answer: Estimate, kind: ComparedKind): number | null {
  const born = answer.methods.born1;
  if (!born || 'unavailable' in born) return null;
  if (kind === 'dcs') {
    const dcs = born.differential[0]?.dcs ?? null;
    return dcs === null ? null : dcs * composedFactor(answer.units.area, 'angstrom2');
  }
  return 'divergent' in born.elastic
    ? null
    : born.elastic.value * composedFactor(born.elastic.unit, 'angstrom2');
}
