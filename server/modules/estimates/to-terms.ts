import { isOriginal } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { choiceFaults } from '#server/physics/potentials/parameters.ts';
import type { Form, FormContext, FormValue, Term } from '#server/physics/potentials/types.ts';
import { FORMS, formByKey } from '#server/physics/potentials/register.ts';
import type { Faults } from './faults.ts';
import { didYouMean } from './nearest.ts';
import { TABLE_MEMBERS, example, readParameter } from './read-parameter.ts';

type Values = Record<string, FormValue>;

const escaped = (key: string): string => key.replaceAll('~', '~0').replaceAll('/', '~1');

/** Every member a term of this form may have beside `form`. */
function membersOf({ parameters }: Form): string[] {
  return parameters.flatMap(({ key, dimension }) =>
    dimension === 'points' ? [...TABLE_MEMBERS, key] : [key],
  );
}

function unknownMembers(form: Form, sent: InteractionTerm, path: string, faults: Faults): void {
  const known = membersOf(form);
  for (const key of Object.keys(sent)) {
    if (key === 'form' || known.includes(key)) continue;
    const hint =
      key === 'corrections'
        ? ' Corrections stand at the top of the body, beside interaction.'
        : didYouMean(key, known);
    faults.add(
      `${path}/${escaped(key)}`,
      `"${key}" is no parameter of the form ${form.key}; it takes ${known.join(', ')}.${hint}`,
    );
  }
}

function readValues(form: Form, sent: InteractionTerm, path: string, faults: Faults): Values {
  const values: Values = {};
  unknownMembers(form, sent, path, faults);
  const given = Object.fromEntries(
    form.parameters.flatMap(({ key }) => {
      const value = Object.hasOwn(sent, key) ? sent[key] : undefined;
      return value === undefined ? [] : [[key, value] as const];
    }),
  );
  for (const parameter of form.parameters) {
    const value = given[parameter.key];
    if (value === undefined) continue;
    const read = readParameter(parameter, value, sent);
    if ('value' in read) values[parameter.key] = read.value;
    else read.faults.forEach((found) => faults.add(`${path}${found.path}`, found.message));
  }
  for (const { key, message, missing } of choiceFaults(form.parameters, given)) {
    const parameter = form.parameters.find((candidate) => candidate.key === key);
    const plain = missing && parameter && parameter.oneOf === undefined;
    faults.add(`${path}/${key}`, plain ? `This is missing; give ${example(parameter)}.` : message);
  }
  if (sent['original'] !== undefined && !isOriginal(sent['original'])) {
    faults.add(`${path}/original`, 'original holds the name and the text of the table.');
  }
  return values;
}

/** A term with its parameters read and checked, not built yet: the register is strict. */
export interface ReadTerm {
  form: Form;
  values: Values;
  path: string;
}

export function readTerms(sent: readonly InteractionTerm[], faults: Faults): ReadTerm[] {
  return sent.flatMap((term, i) => {
    const path = `/interaction/terms/${i}`;
    const form = formByKey(term.form);
    if (!form) {
      const names = FORMS.map(({ key }) => key);
      const hint = didYouMean(term.form, names);
      faults.add(
        `${path}/form`,
        `"${term.form}" is not a form of this version. Forms: ${names.join(', ')}.${hint}`,
      );
      return [];
    }
    return [{ form, values: readValues(form, term, path, faults), path }];
  });
}

export function buildTerms(
  read: readonly ReadTerm[],
  context: FormContext,
  faults: Faults,
): Term[] {
  return read.flatMap(({ form, values, path }) => {
    const term = faults.within(path, () => form.build(values, context));
    return term ? [term] : [];
  });
}
