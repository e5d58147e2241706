import { INPUT_DISTRIBUTIONS } from '#shared/contracts/run-plans.ts';
import type { UncertainInput } from '#shared/contracts/run-plans.ts';
import { ChoiceField } from '../components/choice-field.tsx';
import { NumberField } from '../components/typed-fields.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { putKind } from './model/uncertainties.ts';
import type { Kind } from './model/uncertainties.ts';
import { INPUT_NAMES } from './model/words.ts';

interface KindOfUncertaintyProps {
  input: UncertainInput;
  kind: Kind | undefined;
}

/** How an uncertainty is known: from a series of readings or otherwise, its distribution, its degrees of freedom. */
export function KindOfUncertainty({ input, kind = {} }: KindOfUncertaintyProps) {
  const { editDocument } = useEditing();
  const at = `/runPlan/uncertaintyKinds/${input}`;
  const name = INPUT_NAMES[input];
  const choose = (key: 'type' | 'distribution') => (value: Kind[typeof key]) =>
    editDocument(`${at}/${key}`, (document) => putKind(input, key)(document, value));
  return (
    <div className="mt-3 grid items-start gap-3 border-t border-line pt-2 @xs:grid-cols-2 @xl:grid-cols-3">
      <ChoiceField<'A' | 'B'>
        pointer={`${at}/type`}
        label={`Type, ${name}`}
        value={kind.type ?? 'B'}
        choices={[
          { value: 'A', label: 'A: readings' },
          { value: 'B', label: 'B: otherwise' },
        ]}
        onChange={choose('type')}
      />
      <ChoiceField<(typeof INPUT_DISTRIBUTIONS)[number]>
        pointer={`${at}/distribution`}
        label={`Distribution, ${name}`}
        value={kind.distribution ?? 'normal'}
        choices={INPUT_DISTRIBUTIONS.map((value) => ({ value, label: value }))}
        onChange={choose('distribution')}
      />
      <NumberField
        optional
        pointer={`${at}/freedom`}
        label={`Degrees of freedom, ${name}`}
        value={kind.freedom}
        rules={{ minimum: 0, exclusiveMinimum: true, what: 'The degrees of freedom' }}
        put={putKind(input, 'freedom')}
        hint="Empty: known without end."
      />
    </div>
  );
}
