import { Formula } from '#src/components/formula.tsx';
import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import { parameterApplies } from '#shared/contracts/forms.ts';
import type { FormInfo, FormParameterInfo } from '#shared/contracts/forms.ts';
import { isQuantity } from '#shared/contracts/terms.ts';
import { unitSymbol } from '#shared/units/format.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { useEditing } from '../editing/editor-context.ts';
import { setAlternative, setChoice, setParameter } from '../model/terms.ts';
import { choiceName } from '../model/words.ts';
import { FormulaField, TermPotential } from '../expression/formula-field.tsx';
import { NamedQuantitiesField } from '../expression/named-quantities.tsx';
import { TableField } from '../table/table-field.tsx';
import { ChoiceField } from './choice-field.tsx';
import { NameField } from './name-field.tsx';
import { readElement, readNuclide } from './nuclide-field.tsx';
import { NumberField, QuantityField } from './typed-fields.tsx';

function isDimension(name: string): name is Dimension {
  return Object.hasOwn(UNITS, name);
}

function ParameterLabel({ parameter }: { parameter: FormParameterInfo }) {
  return (
    <>
      {parameter.label} <Formula tex={parameter.symbol} className="text-ink" />
      {parameter.optional && ' (may be empty)'}
    </>
  );
}

interface ParameterFieldProps {
  term: InteractionTerm;
  index: number;
  form: FormInfo;
  parameter: FormParameterInfo;
}

/** A quantity or a plain number. */
function NumericField({ term, index, parameter }: ParameterFieldProps) {
  const { key, dimension, minimum, maximum, exclusiveMinimum, integer, optional } = parameter;
  const value = term[key];
  const bounds = { minimum, maximum, exclusiveMinimum, integer, what: parameter.label };
  const shared = {
    pointer: `/interaction/terms/${index}/${key}`,
    label: <ParameterLabel parameter={parameter} />,
    optional: optional ?? false,
    hint: parameter.description,
  };
  const initial = parameter.default;
  if (isQuantity(initial) && isDimension(dimension)) {
    return (
      <QuantityField
        {...shared}
        name={`${parameter.label} of term ${index + 1}`}
        dimension={dimension}
        value={isQuantity(value) ? value : undefined}
        fallbackUnit={initial.unit}
        rules={{ ...bounds, unit: initial.unit }}
        put={(document, next) => setParameter(document, index, key, next)}
      />
    );
  }
  return (
    <NumberField
      {...shared}
      value={typeof value === 'number' ? value : undefined}
      rules={bounds}
      put={(document, next) => setParameter(document, index, key, next)}
    />
  );
}

/** One of the values the register lists. */
function ListedField({ term, index, form, parameter }: ParameterFieldProps) {
  const { edit } = useEditing();
  const pointer = `/interaction/terms/${index}/${parameter.key}`;
  const value = term[parameter.key];
  return (
    <ChoiceField<string>
      pointer={pointer}
      label={<ParameterLabel parameter={parameter} />}
      value={typeof value === 'string' ? value : ''}
      choices={(parameter.choices ?? []).map((one) => ({
        value: one,
        label: choiceName(one) ?? unitSymbol(one),
      }))}
      hint={parameter.description}
      onChange={(chosen) =>
        edit(pointer, (draft) => ({
          ...draft,
          document: setChoice(draft.document, index, form, { key: parameter.key, value: chosen }),
        }))
      }
    />
  );
}

/** A nuclide or an element. */
function NamedField({ term, index, parameter }: ParameterFieldProps) {
  const { key, dimension } = parameter;
  const value = term[key];
  return (
    <NameField
      pointer={`/interaction/terms/${index}/${key}`}
      label={<ParameterLabel parameter={parameter} />}
      value={typeof value === 'string' ? value : ''}
      read={dimension === 'nuclide' ? readNuclide : readElement}
      put={(document, name) => setParameter(document, index, key, name)}
      hint={parameter.description}
    />
  );
}

/** One parameter, as the register describes it. */
function ParameterField(props: ParameterFieldProps) {
  const { parameter } = props;
  switch (parameter.dimension) {
    case 'choice':
      return <ListedField {...props} />;
    case 'nuclide':
    case 'element':
      return <NamedField {...props} />;
    case 'points':
      return <TableField {...props} />;
    case 'formula':
      return <FormulaField {...props} />;
    case 'quantities':
      return (
        <>
          <NamedQuantitiesField {...props} />
          <TermPotential term={props.term} name="The formula" />
        </>
      );
    default:
      return <NumericField {...props} />;
  }
}

/** Which of several parameters is given, where exactly one may be. */
function AlternativeField({ term, index, form, parameter }: ParameterFieldProps) {
  const { edit } = useEditing();
  const alternatives = form.parameters.filter(({ oneOf }) => oneOf === parameter.oneOf);
  const given = alternatives.find(({ key }) => term[key] !== undefined) ?? parameter;
  const pointer = `/interaction/terms/${index}/${given.key}`;
  return (
    <>
      <ChoiceField<string>
        exact
        pointer={`/interaction/terms/${index}/${parameter.oneOf ?? ''}`}
        label="Given by"
        value={given.key}
        choices={alternatives.map(({ key, label }) => ({ value: key, label }))}
        onChange={(key) =>
          edit(`${pointer} alternative`, (draft) => ({
            ...draft,
            document: setAlternative(draft.document, index, alternatives, key),
            open: Object.fromEntries(Object.entries(draft.open).filter(([at]) => at !== pointer)),
          }))
        }
      />
      <ParameterField term={term} index={index} form={form} parameter={given} />
    </>
  );
}

/** The parameters of a term: those that apply, and of alternatives the one that is given. */
export function ParameterFields({ term, index, form }: Omit<ParameterFieldProps, 'parameter'>) {
  const applying = form.parameters.filter((parameter) => parameterApplies(parameter, term));
  const shown = applying.filter(
    ({ oneOf }, place) =>
      oneOf === undefined || applying.findIndex((one) => one.oneOf === oneOf) === place,
  );
  return shown.map((parameter) =>
    parameter.oneOf === undefined ? (
      <ParameterField
        key={parameter.key}
        term={term}
        index={index}
        form={form}
        parameter={parameter}
      />
    ) : (
      <AlternativeField
        key={parameter.oneOf}
        term={term}
        index={index}
        form={form}
        parameter={parameter}
      />
    ),
  );
}
