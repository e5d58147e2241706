import { describeTerm } from '#server/documents/describe-interaction.ts';
import { plainQuantity } from '#server/documents/plain-quantity.ts';
import { summarise } from '#server/documents/summarise.ts';
import { unitSymbol } from '#shared/units/format.ts';
import { drawPairs, drawTable } from './table.ts';
import type { Paper } from './paper.ts';
import type { ReportInput } from './report-input.ts';
import { METHOD_NAMES, amount, frameOf, number, numericsOf } from './words.ts';

const CORRECTIONS = { mckinleyFeshbach: 'McKinley and Feshbach' } as const;

/** What was assumed, as far as the document says it. */
export function assumptions({ version, cited }: ReportInput): [string, string][] {
  const { document, result } = version;
  const { estimate } = result;
  const summary = summarise(document);
  const entered = document.entered ?? {};
  const { terms, citation } = document.interaction;
  const corrections = (document.corrections ?? []).map((name) => CORRECTIONS[name]);
  return [
    ['Beam', summary.beam],
    ['Target', summary.target],
    ...terms.map((term, index): [string, string] => [
      terms.length > 1 ? `Interaction, term ${index + 1}` : 'Interaction',
      describeTerm(term, index, entered),
    ]),
    ...terms.flatMap((term): [string, string][] =>
      typeof term.formula === 'string' ? [['Formula in full', term.formula]] : [],
    ),
    ...(citation
      ? [['Taken from', cited ?? `the library, version ${citation.version}`] as [string, string]]
      : []),
    ['Angles', summary.detectors],
    ['Frame', frameOf(estimate, document.target.kind === 'fixed')],
    ['Kinematics', document.kinematics === 'relativistic' ? 'relativistic' : 'non-relativistic'],
    ['Methods', document.methods.map((method) => METHOD_NAMES[method]).join(', ')],
    ['Corrections', corrections.length > 0 ? corrections.join(', ') : 'none'],
    ['Identical particles', estimate.identical ? 'yes, symmetrised' : 'no'],
  ];
}

export function drawAssumptions(paper: Paper, input: ReportInput): void {
  paper.heading('Assumptions');
  drawPairs(paper, assumptions(input));
  const { kinematics } = input.version.result.estimate;
  paper.heading('Kinematics', 2);
  drawPairs(paper, [
    ['Wave number k', amount(kinematics.k)],
    ['Wavelength', amount(kinematics.wavelength)],
    ['Relative speed', amount(kinematics.speed)],
    ['β', number(kinematics.beta)],
    ['Reduced mass', amount(kinematics.reducedMass)],
    ['Energy, centre of mass', amount(kinematics.energyCm)],
  ]);
}

/** The chain of the golden rule, to be checked by hand. */
export function drawGoldenRule(paper: Paper, { version }: ReportInput): void {
  const { goldenRule, units } = version.result.estimate;
  paper.heading('Golden rule');
  if ('unavailable' in goldenRule) {
    paper.text(`Not available: ${goldenRule.reason}`);
    return;
  }
  const { matrixElementTimesVolume: element } = goldenRule;
  const imaginary =
    element.im === 0 ? '' : ` ${element.im < 0 ? '−' : '+'} ${number(Math.abs(element.im))} i`;
  const angle = plainQuantity({ value: goldenRule.theta, unit: units.angle });
  drawTable(
    paper,
    [
      { head: `Step, at θ = ${angle}`, share: 3 },
      { head: 'Value', share: 3, align: 'right' },
      { head: 'Numerical error', share: 2, align: 'right' },
    ],
    [
      ['box side', amount(goldenRule.boxSide), '—'],
      ['momentum transfer q', amount(goldenRule.q), '—'],
      [
        'matrix element times volume',
        `${number(element.re)}${imaginary} ${unitSymbol(element.unit)}`,
        numericsOf(element),
      ],
      ['density of final states', amount(goldenRule.densityOfStates), '—'],
      ['rate', amount(goldenRule.rate), '—'],
      ['incoming flux', amount(goldenRule.flux), '—'],
      ['dσ/dΩ = rate / flux', amount(goldenRule.dcs), '—'],
      ...goldenRule.factorsAfter.map(({ name, dcs }) => [`with ${name}`, amount(dcs), '—']),
    ],
  );
}
