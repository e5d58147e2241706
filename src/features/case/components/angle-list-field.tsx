import { Field, TextArea } from '#src/components/field.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { withEntered } from '../model/entered.ts';
import { problemAt } from '../model/problems.ts';
import { anglesOf, straightAngle } from '../model/table.ts';
import { readNumberList, takeText } from '../model/typing.ts';

/** The angles of the table, written out. */
export function AngleListField() {
  const { draft, edit, problems, readOnly } = useEditing();
  const angles = anglesOf(draft.document);
  const straight = straightAngle(angles.unit);
  if (!('values' in angles)) return null;
  const { unit } = angles;
  const pointer = '/angles/values';
  // A long list does not fit what may be kept as typed: the numbers are then shown as they are.
  const text = draft.open[pointer]?.text ?? angles.values.map(String).join(', ');
  return (
    <Field
      label={`Angles (${unit})`}
      hint={`${angles.values.length} angles; separate them by commas or spaces.`}
      error={problemAt(problems, pointer)}
    >
      {(control) => (
        <TextArea
          {...control}
          className="font-mono"
          disabled={readOnly}
          value={text}
          onChange={(event) => {
            const typed = event.target.value;
            const rules = { minimum: 0, maximum: straight, what: 'An angle' };
            edit(pointer, (before) => {
              const reading = readNumberList(typed, rules);
              // While a separator is being typed the text stays as it is.
              const unfinished =
                'value' in reading && reading.value.map(String).join(', ') !== typed;
              const next = takeText(before, pointer, typed, reading, (document, values) => ({
                ...document,
                angles: { unit, values },
              }));
              const document = withEntered(next.document, pointer, null);
              return unfinished
                ? {
                    ...next,
                    document,
                    open: { ...next.open, [pointer]: { text: typed, problem: null } },
                  }
                : { ...next, document };
            });
          }}
        />
      )}
    </Field>
  );
}
