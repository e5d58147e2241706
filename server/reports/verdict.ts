import type { Validity } from '#shared/contracts/estimates.ts';
import { plainQuantity } from '#server/documents/plain-quantity.ts';
import type { Paper } from './paper.ts';
import type { ReportInput } from './report-input.ts';
import { drawTable } from './table.ts';
import { CRITERION_NAMES, VERDICT_WORDS, percent, short } from './words.ts';

const MEANINGS: Record<Validity['verdict'], string> = {
  sound: 'First Born may be quoted as it stands.',
  usable: 'First Born may be used if its deviation is stated beside it.',
  notValid: 'First Born is not to be quoted for this case.',
  unassessed: 'Nothing here says whether first Born may be trusted.',
};

/** What the verdict rests on: the number that decided, and the limits it was held against. */
export function basisText(validity: Validity): string {
  const { basis, deviation, deviations, criteria, reason } = validity;
  if (basis === 'exact' && deviation !== undefined) {
    const what =
      deviations?.decides === 'weighted'
        ? 'the deviation weighted by solid angle'
        : 'the deviation of the elastic total';
    const limits = deviations
      ? `; sound below ${percent(deviations.limits.sound)}, usable below ${percent(deviations.limits.usable)}`
      : '';
    return `By the exact calculation: ${what} is ${percent(deviation)}${limits}.`;
  }
  const decides = criteria.find((criterion) => criterion.decides);
  if (!decides) return reason ?? 'No criterion applies.';
  const { name, value, limits } = decides;
  return `By criteria: ${CRITERION_NAMES[name]} ${short(value)}; sound below ${limits.sound}, usable below ${limits.usable}.`;
}

/** The verdict in brief: the word, what it rests on, what it means. */
export function drawVerdict(paper: Paper, { version }: ReportInput): void {
  const { validity } = version.result.estimate;
  paper.text(`First Born here: ${VERDICT_WORDS[validity.verdict]}`, { face: 'bold', size: 11 });
  paper.text(`${basisText(validity)} ${MEANINGS[validity.verdict]}`);
}

/** The verdict whole: deviations, every criterion with its limits, and what to use instead. */
export function drawVerdictInFull(paper: Paper, input: ReportInput): void {
  const { validity, units } = input.version.result.estimate;
  paper.heading('Validity of first order');
  drawVerdict(paper, input);
  const { reason } = validity;
  if (reason && !basisText(validity).includes(reason)) paper.text(reason);
  if (validity.instead) paper.text(`Use instead: ${validity.instead}`);
  const { deviations, criteria } = validity;
  if (deviations) {
    const { largest, largestAt, weighted, elastic } = deviations;
    const at = plainQuantity({ value: Number(largestAt.toPrecision(4)), unit: units.angle });
    paper.text(
      `First Born against the exact calculation: elastic total ${elastic === undefined ? 'divergent' : percent(elastic)}, weighted by solid angle ${percent(weighted)}, largest ${percent(largest)} at ${at} (centre of mass).`,
    );
  }
  if (criteria.length === 0) return;
  drawTable(
    paper,
    [
      { head: 'Criterion', share: 1.6 },
      { head: 'What it is', share: 4.6 },
      { head: 'Value', share: 1.2, align: 'right' },
      { head: 'Sound below', share: 1.1, align: 'right' },
      { head: 'Usable below', share: 1.1, align: 'right' },
      { head: '', share: 0.8 },
    ],
    criteria.map(({ name, meaning, value, limits, decides }) => [
      CRITERION_NAMES[name],
      meaning,
      short(value),
      String(limits.sound),
      String(limits.usable),
      decides ? 'decides' : '',
    ]),
  );
}
