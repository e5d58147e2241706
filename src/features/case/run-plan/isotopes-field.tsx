import { Field, TextInput } from '#src/components/field.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { problemAt } from '../model/problems.ts';
import { takeText } from '../model/typing.ts';
import { isotopesText, readIsotopes } from './model/isotopes.ts';
import { putIn } from './model/plan.ts';

interface IsotopesFieldProps {
  part: 'foil' | 'gas';
  value: Record<string, number> | undefined;
}

/** A mixture of isotopes in place of the natural one, as a list. */
export function IsotopesField({ part, value }: IsotopesFieldProps) {
  const { draft, edit, readOnly, problems } = useEditing();
  const pointer = `/runPlan/${part}/isotopes`;
  const { entered } = draft.document;
  return (
    <Field
      label="Isotopes"
      hint="Mole fractions such as Li-6 0.95, Li-7 0.05; empty is the natural mixture."
      error={problemAt(problems, pointer)}
      className="@[21rem]:col-span-2"
    >
      {(control) => (
        <TextInput
          {...control}
          disabled={readOnly}
          autoComplete="off"
          spellCheck={false}
          className="font-mono"
          value={draft.open[pointer]?.text ?? entered?.[pointer] ?? isotopesText(value)}
          onChange={(event) => {
            const text = event.target.value;
            edit(pointer, (before) =>
              takeText(before, pointer, text, readIsotopes(text), putIn(part, 'isotopes')),
            );
          }}
        />
      )}
    </Field>
  );
}
