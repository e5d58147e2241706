import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { DifferentialPoint, Estimate, InteractionTerm } from '#shared/contracts/estimates.ts';
import { isQuantity } from '#shared/contracts/terms.ts';
import { HBAR_C_EV_ANGSTROM } from '#shared/units/codata.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { toInternal } from '#shared/units/quantity.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { without } from '../../model/without.ts';
import { CLOSED } from './python-forms.ts';
import type { Closed } from './python-forms.ts';

/** A program, or why the closed formula cannot stand for the case. */
export type Snippet = { code: string } | { refused: string };

const CHARGED = ['coulomb', 'screenedCoulomb'];
/** Straight forward a bare charge diverges and series would be needed: the comparison begins beside it. */
const FORWARD = 1e-12;

function internal(term: InteractionTerm, key: string, dimension: Dimension): number | null {
  const value = term[key];
  if (typeof value === 'number') return value;
  return isQuantity(value) ? toInternal(value, dimension) : null;
}

/** The call of a term's transform with its values, or null where one of them is not a number. */
function callOf(term: InteractionTerm, { parameters, complex }: Closed, charge: number | null) {
  const values: (string | null)[] = [];
  if (CHARGED.includes(term.form)) {
    const product = internal(term, 'chargeProduct', 'energy') ?? charge;
    values.push(product === null ? null : String(product));
  }
  if (complex) {
    const re = internal(term, 'V0', 'energy');
    const im = internal(term, 'W0', 'energy') ?? 0;
    values.push(re === null ? null : im === 0 ? String(re) : `complex(${re}, ${im})`);
  }
  for (const [key, dimension] of parameters) {
    const value = internal(term, key, dimension);
    values.push(value === null ? null : String(value));
  }
  return values.includes(null) ? null : `${term.form}(${['q', ...values].join(', ')})`;
}

/** A few angles over the whole curve, those with a value. */
function samples(points: readonly DifferentialPoint[]): (DifferentialPoint & { dcs: number })[] {
  const usable = points.flatMap((point) =>
    point.dcs !== null && point.amplitude && point.theta > FORWARD
      ? [{ ...point, dcs: point.dcs }]
      : [],
  );
  const wanted = [0, 0.25, 0.5, 0.75, 1].map((share) => Math.round(share * (usable.length - 1)));
  return [...new Set(wanted)].flatMap((place) => usable[place] ?? []);
}

/** Whether |f|² is the whole of the curve: with spin or incoherent scattering it is not. */
function isSquare({ amplitude, dcs }: DifferentialPoint, area: number): boolean {
  if (!amplitude || dcs === null) return true;
  const square = (amplitude.re ** 2 + amplitude.im ** 2) * area;
  return Math.abs(square - dcs) <= 1e-9 * dcs;
}

function refusal(document: CaseDocument, estimate: Estimate): string | null {
  if (estimate.frame !== 'cm') {
    return 'The closed formula is that of the centre of mass; choose that frame on the plot, or call the API.';
  }
  if (estimate.identical) {
    return 'The particles are identical: the exchanged amplitude belongs to the curve. Call the API.';
  }
  const other = document.interaction.terms.find(({ form }) => !CLOSED[form]);
  return other
    ? `There is no short closed formula for the form ${other.form} to copy. Call the API.`
    : null;
}

const INCOMPLETE = 'A parameter of this case is read from a table. Call the API.';

/** A program of Python's standard library alone that computes the curve from the closed formula and compares it with the values here. */
export function closedSnippet(
  document: CaseDocument,
  estimate: Estimate,
  chargeProduct: number | null,
): Snippet {
  const refused = refusal(document, estimate);
  if (refused !== null) return { refused };
  const born = estimate.methods.born1;
  if (!born || 'unavailable' in born) return { refused: 'First order has no value here.' };
  const { units, kinematics, engine } = estimate;
  const points = samples(born.differential);
  const perArea = composedFactor(`${units.length}2`, units.area);
  if (!points.every((point) => isSquare(point, perArea))) {
    return {
      refused:
        'Spin or incoherent scattering stands beside the squared amplitude in this curve. Call the API.',
    };
  }
  const { terms } = document.interaction;
  const calls = terms.map((term) => {
    const closed = CLOSED[term.form];
    return closed ? callOf(term, closed, chargeProduct) : null;
  });
  if (calls.includes(null)) return { refused: INCOMPLETE };
  const functions = [...new Set(terms.map(({ form }) => CLOSED[form]?.code ?? ''))];
  const k = kinematics.k.value * composedFactor(kinematics.k.unit, '1/angstrom');
  const mass = kinematics.reducedMass.value * composedFactor(kinematics.reducedMass.unit, 'eV');
  const toRadians =
    units.angle === 'deg'
      ? 'math.radians(theta)'
      : units.angle === 'mrad'
        ? 'theta / 1000'
        : 'theta';
  const toArea = composedFactor(`${units.area}/sr`, 'angstrom2/sr');
  const table = points.map(({ theta, dcs }) => `    (${theta}, ${dcs * toArea}),`);
  const charged = terms.some(({ form }) => CHARGED.includes(form));
  return {
    code: `# First Born approximation, centre of mass. Numbers of ${engine.name} ${engine.version}, CODATA 2022.
import math

HBAR_C = ${HBAR_C_EV_ANGSTROM}  # eV angstrom
${charged ? 'ALPHA = 7.2973525643e-3\n' : ''}K = ${k}  # wave number, 1/angstrom
MASS = ${mass}  # reduced mass times c^2, eV
FACTOR = 2 * MASS / HBAR_C**2  # 2 mu/hbar^2, 1/(eV angstrom^2)


# Transforms of V(r): integral of r^2 V(r) sin(qr)/(qr) dr, eV angstrom^3.
${functions.join('\n\n\n')}


def dcs(theta):
    """Differential cross section, angstrom^2/sr, at an angle in ${units.angle}."""
    q = 2 * K * math.sin(${toRadians} / 2)
    transform = ${calls.join(' + ')}
    return abs(FACTOR * transform)**2


# Angle in ${units.angle}, and what ${engine.name} answers there in angstrom^2/sr.
for theta, expected in [
${table.join('\n')}
]:
    print(theta, dcs(theta), dcs(theta) / expected - 1)
`,
  };
}

/** A program that asks the application for the whole estimate; the token is the person's own to put in. */
export function apiSnippet(document: CaseDocument, address: string, angleUnit: string): string {
  // JSON never holds three quotation marks in a row, so that it stands in a raw string as it is.
  const body = JSON.stringify(without(document, 'entered', 'format', 'runPlan'), null, 2);
  return `# The whole estimate over the API. Make a token under Account, and keep it out of files you share.
import json
import os
import urllib.request

document = json.loads(r"""${body}""")

request = urllib.request.Request(
    ${JSON.stringify(`${address}/api/estimates`)},
    data=json.dumps(document).encode(),
    headers={
        "Authorization": "Bearer " + os.environ["TALLYBARN_TOKEN"],
        "Content-Type": "application/json",
    },
)
with urllib.request.urlopen(request) as answer:
    estimate = json.load(answer)

for point in estimate["methods"]["born1"]["differential"]:
    print(point["theta"], point["dcs"])  # ${angleUnit}, area per steradian
`;
}
