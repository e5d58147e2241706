import { decidingNumber, numericsText, VERDICT_WORDS } from '../../model/verdict.ts';
import { REGIME_NAMES } from '../../model/words.ts';
import type { Given, Meaning } from './meaning-amplitude.ts';

const WEIGHS =
  'Numerical error says nothing of the approximation, and neither of them is a standard uncertainty of your inputs. Elastic scattering only.';

function approximation({ estimate, document }: Given): string {
  const { validity } = estimate;
  const regime = REGIME_NAMES[document.kinematics ?? 'nonrelativistic'];
  return `First Born, first order in V, ${regime} kinematics. Verdict here: ${VERDICT_WORDS[validity.verdict].word} (${decidingNumber(validity)}).`;
}

/** Sources of the approximation and of the forms, each once. */
function sources({ document, forms }: Given): string {
  const ofForms = document.interaction.terms.flatMap(
    ({ form }) => forms.find(({ key }) => key === form)?.source ?? [],
  );
  return [...new Set(['M. Born, Z. Phys. 38 (1926) 803', ...ofForms])].join('; ');
}

export function facts(given: Given, unit: string, frame: string, error: string): Meaning['facts'] {
  const { engine } = given.estimate;
  return [
    { name: 'Unit', text: unit },
    { name: 'Frame', text: frame },
    { name: 'Approximation', text: approximation(given) },
    { name: 'Numerical error', text: error },
    { name: 'Limits of it', text: WEIGHS },
    {
      name: 'Source',
      text: `${sources(given)}. Computed by ${engine.name} ${engine.version} with CODATA 2022.`,
    },
  ];
}

export const ERROR_OF_INTEGRAL =
  'a bound of the distance from the exact value of this model, by two orders of the quadrature, errors of the amplitude and rounding';
export const ERROR_OF_POINT =
  'a bound of the distance from the exact value of this model, by rounding and the error of the transform';

export function errorText(
  error: { relativeError?: number; absoluteError?: number },
  what: string,
): string {
  return `${numericsText(error).replace('numerics ', '')}, ${what}.`;
}

export function errorsOf(source: {
  relativeError?: number | undefined;
  absoluteError?: number | undefined;
}): { relativeError?: number; absoluteError?: number } {
  const { relativeError, absoluteError } = source;
  return {
    ...(relativeError === undefined ? {} : { relativeError }),
    ...(absoluteError === undefined ? {} : { absoluteError }),
  };
}
