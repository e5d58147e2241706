import { useEditing } from '../editing/editor-context.ts';
import { fieldsOf } from '../model/fields.ts';

/** On paper the inputs stand as a list of words instead of fields. */
export function InputList() {
  const { draft, forms } = useEditing();
  return (
    <section aria-label="Inputs in words" className="mb-4 hidden print:block">
      <dl className="grid grid-cols-[auto_1fr] gap-x-6">
        {fieldsOf([draft], forms)
          .filter(({ key }) => key !== 'title' && key !== 'tags')
          .map((field) => (
            <div key={field.key} className="contents">
              <dt className="text-muted">{field.label}</dt>
              <dd>{field.text(draft)}</dd>
            </div>
          ))}
      </dl>
    </section>
  );
}
