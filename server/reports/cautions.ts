import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import { toInternal } from '#shared/units/quantity.ts';
import { BARN, INK, SOFT } from './paper.ts';
import type { Paper } from './paper.ts';
import type { ReportInput } from './report-input.ts';

/** What a report that sizes a run is not. */
export const CAUTION =
  'An estimate, not an authorisation. These figures are for planning counts only, not for shielding, dose, interlock or activation decisions: local radiation-protection rules and the licensed officer decide.';

const LEPTONS = ['electron', 'positron', 'muon-', 'muon+'];
const TOXIC = ['Be', 'As', 'Se', 'Cd', 'Te', 'Os', 'Hg', 'Tl', 'Pb', 'Th', 'U', 'Pu'];
const REACTIVE = ['Li', 'Na', 'K', 'Rb', 'Cs', 'Ca', 'Sr', 'Ba'];
const RADIOACTIVE_FROM = [
  'Tc',
  'Pm',
  'Po',
  'At',
  'Rn',
  'Fr',
  'Ra',
  'Ac',
  'Th',
  'Pa',
  'U',
  'Np',
  'Pu',
];
/** Above it leptons free nucleons from nuclei, eV. */
const PHOTONUCLEAR = 5e6;
/** Gas colder than this has to do with a cryogen, K. */
const COLD = 200;

const elementOf = (name: string): string => /^[A-Z][a-z]?/.exec(name)?.[0] ?? '';

function elementsOf(document: CaseDocument, plan: RunPlan | undefined): string[] {
  const { target } = document;
  const names = [
    ...(plan?.atoms.map(({ name }) => name) ?? []),
    ...(target.kind === 'nuclide' ? [target.nuclide] : []),
  ];
  return [...new Set(names.map(elementOf))].filter((name) => name !== '');
}

function beamQuestions(document: CaseDocument): string[] {
  const { projectile } = document;
  const species = 'species' in projectile ? projectile.species : '';
  const lepton = LEPTONS.includes(species);
  const energetic = toInternal(document.energy, 'energy') > PHOTONUCLEAR;
  return [
    ...(!lepton || energetic
      ? [
          'Do target, holder, collimators or air become active, and who measures them before they are touched?',
        ]
      : []),
    ...(species === 'neutron'
      ? [
          'Where do the neutrons go that the target does not take, and the gamma rays of those captured?',
        ]
      : [
          'Is the high voltage of the source enclosed, interlocked and earthed before anyone reaches in?',
        ]),
    ...(lepton
      ? ['Where does the beam stop, and who has surveyed the X-rays that it makes there?']
      : []),
    'Who may enter the hall, when, and who searches it before beam?',
  ];
}

function targetQuestions(document: CaseDocument, plan: RunPlan | undefined): string[] {
  const elements = elementsOf(document, plan);
  const within = (list: readonly string[]) => elements.filter((name) => list.includes(name));
  const toxic = within(TOXIC);
  const reactive = within(REACTIVE);
  const radioactive = within(RADIOACTIVE_FROM);
  const { foil, gas } = document.runPlan ?? {};
  return [
    ...(toxic.length > 0
      ? [
          `${toxic.join(', ')} is toxic: who handles it, and what catches fragments of a broken target?`,
        ]
      : []),
    ...(reactive.length > 0
      ? [`${reactive.join(', ')} reacts with air or water as a metal: how is it kept and mounted?`]
      : []),
    ...(radioactive.length > 0
      ? [`${radioactive.join(', ')} is radioactive: under whose licence is it held?`]
      : []),
    ...(gas ? ['What holds the pressure of the gas, and what happens when a window bursts?'] : []),
    ...(gas && elementOf(gas.formula) === 'H'
      ? ['Is the gas flammable, and what detects a leak?']
      : []),
    ...(gas && toInternal(gas.temperature, 'temperature') < COLD
      ? ['Which cryogen cools the gas, and can it displace the air of the room?']
      : []),
    ...(foil ? ['How is the vacuum broken without losing the foil, and who may do it?'] : []),
  ];
}

/** The questions that this beam and this target raise, without any figure. */
export function questionsOf({ version }: ReportInput): string[] {
  const { document, result } = version;
  return [...beamQuestions(document), ...targetQuestions(document, result.runPlan)];
}

const textOf = (input: ReportInput): string =>
  `${CAUTION} Ask before the run: ${questionsOf(input).join(' ')}`;
const SIZE = 8;
const PAD = 5;

export function cautionsHeight(paper: Paper, input: ReportInput): number {
  const room = paper.width - 2 * PAD;
  paper.use('plain', SIZE);
  const text = paper.document.heightOfString(paper.written(textOf(input)), { width: room });
  return text + paper.lineHeight() + 2 * PAD + 6;
}

/** In a box of its own, in one piece. */
export function drawCautions(paper: Paper, input: ReportInput): void {
  const height = cautionsHeight(paper, input);
  paper.need(height);
  const { document, left, width, y } = paper;
  document.rect(left, y, width, height - 4).fill(SOFT);
  document.rect(left, y, 2, height - 4).fill(BARN);
  paper.use('bold', SIZE, INK);
  const room = width - 2 * PAD;
  document.text('Cautions: for planning counts only', left + PAD + 2, y + PAD, { width: room });
  paper.use('plain', SIZE, INK);
  document.text(paper.written(textOf(input)), left + PAD + 2, paper.y, { width: room });
  paper.goTo(y + height);
}
